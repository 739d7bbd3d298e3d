import type { Bluetooth, BluetoothCharacteristic, BluetoothDevice } from './bluetooth-browser.ts';
import { listenTo } from './listen-to.ts';
import { createLiveLine } from './live-line.ts';
import { retryMs, type LiveParts, type LiveProbe } from './live-probe.ts';
import {
  findTemperatures,
  TEMPERATURE_SERVICES,
  type FoundTemperatures,
} from './temperature-services.ts';

/** A link that neither comes about nor fails is given up and tried anew. */
const LINK_WITHIN_MS = 20_000;

/** Lets the person choose a probe; in a press only. @throws what the browser throws, also where nothing was chosen */
export function chooseBluetooth(bluetooth: Bluetooth): Promise<BluetoothDevice> {
  return bluetooth.requestDevice({
    filters: TEMPERATURE_SERVICES.map(({ service }) => ({ services: [service] })),
  });
}

/** A probe on Bluetooth, from its first link on. */
export function bluetoothProbe(device: BluetoothDevice, parts: LiveParts): LiveProbe {
  const line = createLiveLine(parts.nowMs);
  let failures = 0;
  let isClosed = false;
  /** Which of several temperatures was chosen. */
  let chosen: number | null = null;
  let found: FoundTemperatures | null = null;
  let stopListening = () => {};
  let cancelRetry = () => {};
  let attempt = 0;

  async function link(): Promise<void> {
    const mine = ++attempt;
    const isStale = () => isClosed || mine !== attempt;
    const cancelPatience = parts.after(LINK_WITHIN_MS, () => isStale() || loseLink());
    try {
      const server = await device.gatt?.connect();
      if (isStale()) return void (isClosed && server?.disconnect());
      found = server ? await findTemperatures(server) : null;
      if (isStale()) return;
      if (!found) return end('This probe has no temperature that the page can read.');
      await choose(found);
    } catch {
      if (!isStale()) loseLink();
    } finally {
      cancelPatience();
    }
  }

  async function choose({ characteristics, read }: FoundTemperatures): Promise<void> {
    const index = characteristics.length === 1 ? 0 : chosen;
    const characteristic = index === null ? undefined : characteristics[index];
    if (!characteristic) return ask(characteristics, read);
    const mine = attempt;
    stopListening();
    const listening = listenTo(characteristic, (value) => line.take(read(value)), parts);
    stopListening = listening.stop;
    await listening.started;
    if (isClosed || mine !== attempt) return;
    failures = 0;
    line.show({ is: 'reading' });
  }

  /** Several temperatures in one probe: shown with what they read, and never guessed. */
  async function ask(
    characteristics: BluetoothCharacteristic[],
    read: FoundTemperatures['read'],
  ): Promise<void> {
    const options: { key: string; words: string }[] = [];
    for (const [i, { properties, readValue }] of characteristics.entries()) {
      const value = properties.read ? read(await readValue.call(characteristics[i])) : null;
      const reads = value && 'temp' in value ? `, now ${value.temp} °${value.unit}` : '';
      options.push({ key: String(i), words: `No. ${i + 1}${reads}` });
    }
    const words = 'This probe has more than one temperature. Which one is in the exhaust?';
    line.show({ is: 'asks', question: { words, options } });
  }

  function loseLink(): void {
    if (isClosed) return;
    stopListening();
    stopListening = () => {};
    attempt++;
    failures++;
    cancelRetry();
    cancelRetry = parts.after(retryMs(failures), () => void link());
    line.show({ is: 'lost' });
  }

  function end(why: string | null): void {
    isClosed = true;
    stopListening();
    cancelRetry();
    device.removeEventListener('gattserverdisconnected', loseLink);
    if (device.gatt?.connected) device.gatt.disconnect();
    line.show({ is: 'ended', why });
  }

  device.addEventListener('gattserverdisconnected', loseLink);
  void link();
  return {
    ...line.shared,
    name: device.name?.trim() || 'Probe without a name',
    by: 'bluetooth',
    answer(key) {
      chosen = Number(key);
      if (found && !isClosed) choose(found).catch(loseLink);
    },
    tryNow() {
      if (line.state().is !== 'lost') return;
      cancelRetry();
      void link();
    },
    async close() {
      if (!isClosed) end(null);
    },
  };
}
