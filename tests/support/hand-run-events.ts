import { randomUUID } from 'node:crypto';
import type { EndSetup, RunEvent } from '#shared/recorder/run-event.ts';
import type { MarkKind } from '#shared/analysis/series.ts';

export type TimedReading = { atS: number; temp: number; from?: 'hand' | 'probe' };
export type TimedMark = { atS: number; kind: MarkKind; text?: string };

/** What may happen to a run beside its readings and marks. */
export type Happened = {
  /** A reading that was a slip, and its undoing. */
  isUndone?: boolean;
  /** One reading typed 30 too high, and put right a while later. */
  isCorrected?: boolean;
  /** The page was gone between two readings; the server's clock was read before and after. */
  isReloaded?: boolean;
  /** Half of it comes from a live probe, which was out of reach for a while. */
  hasProbeGap?: boolean;
};

export type HandRunToMake = {
  visitId: string;
  startedAtMs: number;
  unit: 'F' | 'C';
  setup: EndSetup;
  readings: TimedReading[];
  marks: TimedMark[];
  happened?: Happened;
};

type WithoutStamp<Event> = Event extends RunEvent
  ? Omit<Event, 'id' | 'runId' | 'n' | 'wallMs'>
  : never;
type Bare = WithoutStamp<RunEvent> & { id?: string };

/** The events that a stopwatch would have written of a run, from its start to its end. */
export function handRunEvents(made: HandRunToMake): RunEvent[] {
  const { visitId, startedAtMs, unit, setup } = made;
  const runId = randomUUID();
  const bare: Bare[] = [
    {
      ...{ kind: 'start', atS: 0, visitId, label: 'Run 1', unit, hasTenths: true },
      setup: { ...setup, duct: null, load: null, roomTemp: null },
    },
    ...whatHappened(made),
  ];
  const endS = Math.max(...bare.map(({ atS }) => atS)) + 5;
  bare.push({ kind: 'end', atS: endS, label: 'As found', setup });
  return bare.map((event, n) => ({
    ...event,
    ...{ id: event.id ?? randomUUID(), runId, n },
    wallMs: startedAtMs + Math.round(event.atS * 1000),
  }));
}

function whatHappened({ readings, marks, startedAtMs, happened = {} }: HandRunToMake): Bare[] {
  const kept = happened.hasProbeGap ? withoutThird(readings) : readings;
  const events = kept.flatMap((reading, i) => readingEvents(reading, i, kept.length, happened));
  events.push(...marks.map(({ kind, atS, text }) => markEvent(kind, atS, text ?? null)));
  const middle = kept[kept.length >> 1];
  if (happened.isReloaded && middle) events.push(...reloadAfter(middle.atS, startedAtMs));
  const gap = happened.hasProbeGap && gapOf(kept);
  if (gap) events.push({ kind: 'probe-gap', fromS: gap.fromS, atS: gap.toS - 0.01 });
  return events.sort((a, b) => a.atS - b.atS);
}

function readingEvents(
  { atS, temp, from = 'hand' }: TimedReading,
  i: number,
  count: number,
  { isUndone, isCorrected, hasProbeGap }: Happened,
): Bare[] {
  const id = randomUUID();
  const isSlip = isCorrected && i === Math.floor(count / 4);
  const byProbe = hasProbeGap && i % 2 === 1 ? 'probe' : from;
  const reading: Bare = {
    id,
    kind: 'reading',
    atS,
    temp: isSlip ? temp + 30 : temp,
    from: byProbe,
  };
  if (isSlip) return [reading, { kind: 'correction', atS: atS + 60, of: id, temp }];
  if (!isUndone || i !== Math.floor(count / 3)) return [reading];
  const slip = randomUUID();
  return [
    reading,
    { id: slip, kind: 'reading', atS: atS + 0.5, temp: temp + 44, from: 'hand' },
    { kind: 'undo', atS: atS + 1.5, takes: slip },
  ];
}

function markEvent(mark: MarkKind, atS: number, text: string | null): Bare {
  return { kind: 'mark', atS, mark, text };
}

/** Gone for a second, by the phone's clock; the server's clock says the same before and after. */
function reloadAfter(atS: number, startedAtMs: number): Bare[] {
  const check = (checkS: number): Bare => ({
    ...{ kind: 'clock-check', atS: checkS },
    serverMs: Math.round(startedAtMs + checkS * 1000 + 700),
  });
  return [check(atS + 0.1), { kind: 'asleep', fromS: atS + 0.2, atS: atS + 1.2 }, check(atS + 1.3)];
}

function withoutThird(readings: TimedReading[]): TimedReading[] {
  const from = Math.floor(readings.length * 0.6);
  return readings.filter((_, i) => i < from || i >= from + 3);
}

function gapOf(readings: TimedReading[]): { fromS: number; toS: number } | null {
  const at = Math.floor((readings.length + 3) * 0.6);
  const [before, after] = [readings[at - 1], readings[at]];
  return before && after ? { fromS: before.atS, toS: after.atS } : null;
}
