import type { Bluetooth } from '../../../device/live/bluetooth-browser.ts';
import { bluetoothProbe, chooseBluetooth } from '../../../device/live/bluetooth-probe.ts';
import type {
  LiveParts,
  LiveProbe,
  LiveReading,
  LiveState,
  Silence,
} from '../../../device/live/live-probe.ts';
import type { Serial, SerialPort } from '../../../device/live/serial-browser.ts';
import { serialProbe } from '../../../device/live/serial-probe.ts';
import type { Recorder } from '../recorder.ts';
import { keepLastLink, lastLink } from './last-link.ts';

/** What the page shows of the live probe. */
export type DeskView = {
  probe: { name: string; by: LiveProbe['by']; state: LiveState; silence: Silence } | null;
  /** The newest reading, kept or not; for before a run. */
  latest: LiveReading | null;
  /** Why none could be chosen, in words. */
  problem: string | null;
  /** A person let go of the probe on this page: its silence is no loss. */
  isLetGo: boolean;
};

type Follower = Pick<Recorder, 'readLive' | 'at'>;

const EMPTY: DeskView = { probe: null, latest: null, problem: null, isLetGo: false };
/** A figure that changes more often cannot be read. */
const SHOWN_EVERY_MS = 250;

export type LiveDesk = ReturnType<typeof createLiveDesk>;

/** The one live probe of this page: chosen, followed by a run, let go. */
export function createLiveDesk(
  bluetooth: Bluetooth | null,
  serial: Serial | null,
  parts: LiveParts,
) {
  let probe: LiveProbe | null = null;
  let follower: Follower | null = null;
  let view = EMPTY;
  let unsubscribe = () => {};
  const listeners = new Set<() => void>();

  function show(change: Partial<DeskView>): void {
    view = { ...view, ...change };
    for (const tell of listeners) tell();
  }

  function take(next: LiveProbe): void {
    letGo();
    probe = next;
    const tellState = () =>
      show({
        probe: { name: next.name, by: next.by, state: next.state(), silence: next.silence() },
      });
    const stops = [next.subscribe(tellState), next.onReading(heed)];
    unsubscribe = () => stops.forEach((stop) => stop());
    show({ problem: null, latest: null, isLetGo: false });
    tellState();
  }

  /** On the device before it is on the screen: during a run the page shows what the recorder kept. */
  function heed(reading: LiveReading): void {
    const { temp, unit, monoMs } = reading;
    if (follower) void follower.readLive({ temp, unit }, follower.at(monoMs));
    if (monoMs - (view.latest?.monoMs ?? -Infinity) >= SHOWN_EVERY_MS) show({ latest: reading });
  }

  function letGo(): void {
    unsubscribe();
    unsubscribe = () => {};
    void probe?.close();
    probe = null;
    show({ probe: null, latest: null, isLetGo: true });
  }

  async function choose(choosing: () => Promise<LiveProbe>): Promise<void> {
    try {
      take(await choosing());
    } catch (error) {
      show({ problem: wordsOfRefusal(error) });
    }
  }

  const byBluetooth = (radio: Bluetooth, find = () => chooseBluetooth(radio)) =>
    choose(async () => {
      const device = await find();
      keepLastLink({ by: 'bluetooth', id: device.id });
      return bluetoothProbe(device, parts);
    });
  const byCable = (cables: Serial, baudRate: number, find = () => cables.requestPort()) =>
    choose(async () => {
      const port = await find();
      keepLastLink({ by: 'cable', baudRate });
      return serialProbe(cables, port, baudRate, parts);
    });

  return {
    hasBluetooth: bluetooth !== null,
    hasCable: serial !== null,
    view: () => view,
    subscribe(tell: () => void): () => void {
      listeners.add(tell);
      return () => void listeners.delete(tell);
    },

    /** In a press only: the browser shows its list of probes. */
    async byBluetooth(): Promise<void> {
      if (bluetooth) await byBluetooth(bluetooth);
    },
    /** In a press only. */
    async byCable(baudRate: number): Promise<void> {
      if (serial) await byCable(serial, baudRate);
    },

    /** In a press, after a reload: the probe of before, without choosing it again where the browser allows that. */
    async reconnect(): Promise<void> {
      const last = lastLink();
      if (probe) return probe.tryNow();
      if (serial && (last?.by === 'cable' || !bluetooth)) {
        const baudRate = last?.by === 'cable' ? last.baudRate : 9_600;
        return byCable(serial, baudRate, () => grantedPort(serial));
      }
      if (bluetooth) {
        const id = last?.by === 'bluetooth' ? last.id : null;
        return byBluetooth(bluetooth, () => grantedDevice(bluetooth, id));
      }
    },

    answer: (key: string) => probe?.answer(key),
    tryNow: () => probe?.tryNow(),
    letGo,

    /** From now on the run takes the probe's readings. @returns stops it */
    follow(run: Follower): () => void {
      follower = run;
      return () => {
        if (follower === run) follower = null;
      };
    },
  };
}

/** The only port that was granted before; else the person chooses. */
async function grantedPort(serial: Serial): Promise<SerialPort> {
  const [port, ...others] = await serial.getPorts();
  return port && others.length === 0 ? port : serial.requestPort();
}

async function grantedDevice(bluetooth: Bluetooth, id: string | null) {
  const granted = id === null ? [] : ((await bluetooth.getDevices?.()) ?? []);
  return granted.find((device) => device.id === id) ?? chooseBluetooth(bluetooth);
}

/** The browser says NotFoundError also for a list that was closed without choosing. */
function wordsOfRefusal(error: unknown): string {
  const name = error instanceof Error ? error.name : '';
  if (name === 'NotFoundError') return 'No probe was chosen. Is it switched on, and Bluetooth too?';
  if (name === 'SecurityError' || name === 'NotAllowedError') {
    return 'The browser does not let this page use the probe.';
  }
  return 'The browser could not reach a probe.';
}
