import type { BluetoothCharacteristic } from './bluetooth-browser.ts';
import type { LiveParts } from './live-probe.ts';

/** A probe that does not call by itself is asked each second. */
const ASK_EVERY_MS = 1_000;
/** One that does may call only when the temperature changes (ESS Trigger Setting): silence is asked about. */
const SPACINGS_OF_SILENCE = 3;
const LEAST_SILENCE_MS = 3_000;
/** Until it has called twice. */
const FIRST_SILENCE_MS = 10_000;

/**
 * Takes what a characteristic says by itself, and asks it where it does not. A probe that calls on a rhythm is not asked
 * between two calls: it would only say again what it measured before.
 *
 * @returns `started` rejects where the probe refuses to call
 */
export function listenTo(
  characteristic: BluetoothCharacteristic,
  take: (value: DataView) => void,
  { nowMs, after }: LiveParts,
): { started: Promise<void>; stop: () => void } {
  const { read, notify, indicate } = characteristic.properties;
  const calls = notify || indicate;
  let cancelAsking = () => {};
  let calledAtMs: number | null = null;
  let spacingMs: number | null = null;
  let isAsking = false;
  let isOver = false;

  function silenceMs(): number {
    if (!calls) return ASK_EVERY_MS;
    if (spacingMs === null) return FIRST_SILENCE_MS;
    return Math.max(LEAST_SILENCE_MS, SPACINGS_OF_SILENCE * spacingMs);
  }

  function askLater(): void {
    cancelAsking();
    if (read && !isOver) cancelAsking = after(silenceMs(), () => void ask());
  }

  async function ask(): Promise<void> {
    isAsking = true;
    try {
      const value = await characteristic.readValue();
      // The event has taken it already where the browser fires one for an answer, as the draft has it.
      if (isAsking && !isOver) take(value);
    } catch {
      // It is asked again; a link that is gone says so by itself.
    } finally {
      isAsking = false;
      askLater();
    }
  }

  function handleChange(): void {
    const { value } = characteristic;
    if (isOver || !value) return;
    if (!isAsking) noteCall();
    isAsking = false;
    take(value);
    askLater();
  }

  function noteCall(): void {
    const atMs = nowMs();
    if (calledAtMs !== null) spacingMs = atMs - calledAtMs;
    calledAtMs = atMs;
  }

  async function start(): Promise<void> {
    characteristic.addEventListener('characteristicvaluechanged', handleChange);
    if (!calls) return ask();
    await characteristic.startNotifications();
    askLater();
  }

  return {
    started: start(),
    stop() {
      isOver = true;
      cancelAsking();
      characteristic.removeEventListener('characteristicvaluechanged', handleChange);
    },
  };
}
