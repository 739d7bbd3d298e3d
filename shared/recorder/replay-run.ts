import type { MarkKind } from '../analysis/series.ts';
import type { Measured, RunEvent, RunEventOf } from './run-event.ts';
import { clockSpans, type ClockSpan } from './clock-spans.ts';

export type HandReading = {
  id: string;
  atS: number;
  /** In the run's unit; the newest correction where there is one. */
  temp: number;
  /** As first typed. */
  typed: number;
  from: 'hand' | 'probe';
  /** As a live probe gave it in a unit of its own; null where `temp` says all, also once it was corrected. */
  measured: Measured | null;
};
export type HandMark = { id: string; atS: number; kind: MarkKind; text: string | null };
export type HandCorrection = {
  id: string;
  readingId: string;
  /** Of the reading. */
  atS: number;
  was: number;
  now: number;
  correctedAtS: number;
};
export type GuardChange = Pick<RunEventOf<'guard'>, 'atS' | 'says' | 'why'>;

/** A run taken by hand, as its events make it. */
export type HandRun = {
  start: RunEventOf<'start'>;
  /** In order of time. */
  readings: HandReading[];
  marks: HandMark[];
  corrections: HandCorrection[];
  /** How many readings and marks were taken back. */
  takenBack: number;
  guard: GuardChange[];
  clock: ClockSpan[];
  steps: { atS: number; stepS: number }[];
  probeGaps: { fromS: number; toS: number }[];
  end: RunEventOf<'end'> | null;
  isThrownAway: boolean;
  /** Of the newest event: where the next one goes on. */
  last: { n: number; atS: number; wallMs: number };
};

/**
 * The run that a list of events makes.
 *
 * @param events of one run in any order, each at least once
 * @returns null where its start is not among them
 */
export function replayRun(events: readonly RunEvent[]): HandRun | null {
  const ordered = inOrder(events);
  const [start] = ordered;
  const last = ordered.at(-1);
  if (!last || start?.kind !== 'start') return null;
  const taken = new Set(ofKind(ordered, 'undo').map(({ takes }) => takes));
  const stands = ({ id }: RunEvent) => !taken.has(id);
  const corrections = correctionsOf(ordered.filter(stands));
  return {
    start,
    readings: readingsOf(ordered.filter(stands), corrections),
    marks: ofKind(ordered, 'mark')
      .filter(stands)
      .map(({ id, atS, mark, text }) => ({ id, atS, kind: mark, text }))
      .sort(byTime),
    corrections,
    takenBack: taken.size,
    guard: ofKind(ordered, 'guard').map(({ atS, says, why }) => ({ atS, says, why })),
    clock: clockSpans(ordered),
    steps: ofKind(ordered, 'clock-step').map(({ atS, stepS }) => ({ atS, stepS })),
    probeGaps: ofKind(ordered, 'probe-gap').map(({ fromS, atS }) => ({ fromS, toS: atS })),
    end: ofKind(ordered, 'end').at(-1) ?? null,
    isThrownAway: ordered.some(({ kind }) => kind === 'thrown-away'),
    last: { n: last.n, atS: last.atS, wallMs: last.wallMs },
  };
}

/** What Undo takes back next: the newest thing that a person did and that still stands. A probe's readings are not. */
export function lastToTakeBack(
  events: readonly RunEvent[],
): RunEventOf<'reading' | 'mark' | 'correction'> | null {
  const taken = new Set(ofKind(events, 'undo').map(({ takes }) => takes));
  const newestFirst = inOrder(events).reverse();
  return newestFirst.filter(isTakeable).find(({ id }) => !taken.has(id)) ?? null;
}

function isTakeable(event: RunEvent): event is RunEventOf<'reading' | 'mark' | 'correction'> {
  if (event.kind === 'reading') return event.from === 'hand';
  return event.kind === 'mark' || event.kind === 'correction';
}

/** An event that came twice counts once. */
function inOrder(events: readonly RunEvent[]): RunEvent[] {
  const byId = new Map(events.map((event) => [event.id, event]));
  return [...byId.values()].sort((a, b) => a.n - b.n);
}

function ofKind<Kind extends RunEvent['kind']>(
  events: readonly RunEvent[],
  kind: Kind,
): RunEventOf<Kind>[] {
  return events.filter((event): event is RunEventOf<Kind> => event.kind === kind);
}

function correctionsOf(events: RunEvent[]): HandCorrection[] {
  const values = new Map(ofKind(events, 'reading').map((reading) => [reading.id, reading]));
  return ofKind(events, 'correction').flatMap(({ id, of, temp, atS }) => {
    const reading = values.get(of);
    if (!reading) return [];
    values.set(of, { ...reading, temp });
    const { temp: was, atS: readAtS } = reading;
    return [{ id, readingId: of, atS: readAtS, was, now: temp, correctedAtS: atS }];
  });
}

function readingsOf(events: RunEvent[], corrections: HandCorrection[]): HandReading[] {
  const corrected = new Map(corrections.map(({ readingId, now }) => [readingId, now]));
  return ofKind(events, 'reading')
    .map(({ id, atS, temp, from, measured }) => ({
      id,
      atS,
      temp: corrected.get(id) ?? temp,
      typed: temp,
      from,
      measured: corrected.has(id) ? null : (measured ?? null),
    }))
    .sort(byTime);
}

function byTime(a: { atS: number }, b: { atS: number }): number {
  return a.atS - b.atS;
}
