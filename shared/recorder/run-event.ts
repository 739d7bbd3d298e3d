import type { MarkKind } from '../analysis/series.ts';
import type { DisplayUnit } from '../units.ts';

/** Where the probe sat and how the machine was set; the ones that are null are asked for at the end. */
export type RunSetup = {
  placement: string;
  duct: 'on' | 'off' | null;
  load: 'empty' | 'damp' | null;
  setting: 'high' | 'medium' | 'low';
  roomTemp: number | null;
  probeId: string | null;
};

/** The same with nothing left open. */
export type EndSetup = RunSetup & { duct: 'on' | 'off'; load: 'empty' | 'damp' };

/** What every event carries. */
type Stamp = {
  /** Made on the device; the same event sent twice is told by it. */
  id: string;
  runId: string;
  /** 0, 1, 2 … without a hole, in the order in which things were done. */
  n: number;
  /** Seconds of the run. */
  atS: number;
  /** What the phone's clock said, ms since 1970. */
  wallMs: number;
};

/** A temperature in the unit of the probe that it comes from. */
export type Measured = { temp: number; unit: DisplayUnit };

/** What both clocks said when the end of a run came to the server. */
export type Reached = { serverMs: number; phoneMs: number };

type Happening =
  | {
      kind: 'start';
      visitId: string;
      label: string;
      unit: DisplayUnit;
      hasTenths: boolean;
      setup: RunSetup;
    }
  /** In the run's unit. `measured`: as a live probe gave it, where that speaks another unit. */
  | { kind: 'reading'; temp: number; from: 'hand' | 'probe'; measured?: Measured | undefined }
  | { kind: 'mark'; mark: MarkKind; text: string | null }
  /** Takes back a reading, a mark or a correction. */
  | { kind: 'undo'; takes: string }
  /** Another value for a reading; the first one is kept beside it. */
  | { kind: 'correction'; of: string; temp: number }
  /** The page slept or was gone from `fromS` to now: this span is measured by the phone's clock alone. */
  | { kind: 'asleep'; fromS: number }
  /** The phone's clock was set by so much while the page ran; the run's time did not follow. */
  | { kind: 'clock-step'; stepS: number }
  /** What the server's clock said at this moment. */
  | { kind: 'clock-check'; serverMs: number }
  /** The live probe was out of reach from `fromS` to now. */
  | { kind: 'probe-gap'; fromS: number }
  /** What the guard began to say. */
  | { kind: 'guard'; says: 'quiet' | 'watch' | 'cut-heat' | 'unplug'; why: string }
  /** `reached` is put there by the server. */
  | { kind: 'end'; label: string; setup: EndSetup; reached?: Reached | undefined }
  | { kind: 'thrown-away' };

/** One line of a run taken by hand. The run is the list of them; nothing in it is ever changed. */
export type RunEvent = Stamp & Happening;
export type RunEventKind = RunEvent['kind'];
export type RunEventOf<Kind extends RunEventKind> = Extract<RunEvent, { kind: Kind }>;

const KINDS: readonly string[] = [
  'start',
  'reading',
  'mark',
  'undo',
  'correction',
  'asleep',
  'clock-step',
  'clock-check',
  'probe-gap',
  'guard',
  'end',
  'thrown-away',
] satisfies RunEventKind[];

/** Whether something that lay on the device is one of our events: a light check, the server checks in full. */
export function isRunEvent(found: unknown): found is RunEvent {
  if (typeof found !== 'object' || found === null) return false;
  const { id, runId, n, atS, wallMs, kind } = Object.fromEntries(Object.entries(found));
  return (
    typeof id === 'string' &&
    typeof runId === 'string' &&
    typeof kind === 'string' &&
    KINDS.includes(kind) &&
    [n, atS, wallMs].every((number) => typeof number === 'number' && Number.isFinite(number))
  );
}
