import { median } from '../analysis/statistics/quantile.ts';
import type { HandReading, HandRun } from './replay-run.ts';

/** Longer than this many of its usual spacings without a reading, a live probe is out of reach: as in find-gaps.ts. */
const SPACINGS = 4;
/** A link stumbles for a second or two without being lost. */
const LEAST_S = 5;
/** While its rhythm is not known: the slowest probes of the trade give a reading in ten seconds (common practice). */
const RHYTHM_UNKNOWN_S = 15;
/** The rhythm is that of the newest readings: a probe may change it. */
const LOOKED_AT = 9;
/** Readings by hand further apart than this are not joined within a gap of the probe; as long as the keypad guesses. */
const JOINED_WITHIN_S = 45;

type Readings = Pick<HandRun, 'readings'>;

/** The newest reading of the live probe that stands; null where it gave none. */
export function lastOfProbe({ readings }: Readings): HandReading | null {
  return readings.findLast(({ from }) => from === 'probe') ?? null;
}

/** After how many seconds without a reading the live probe counts as out of reach. */
export function gapAfterS({ readings }: Readings): number {
  const newest = newestOfProbe(readings);
  const steps = newest.slice(1).map(({ atS }, i) => atS - newest[i]!.atS);
  if (steps.length < 2) return RHYTHM_UNKNOWN_S;
  return Math.max(LEAST_S, SPACINGS * median(Float64Array.from(steps)));
}

/**
 * The gap that the live probe's silence has grown to. It begins at the probe's last reading, whatever ended the link: a
 * lost signal, a reload, or a person. Known from the run alone, so that it is the same after a reload.
 *
 * @param atS now, s of the run
 * @returns null while the probe reads, and in a run without one
 */
export function openGap(run: Readings, atS: number): { fromS: number } | null {
  const last = lastOfProbe(run);
  return last && atS - last.atS > gapAfterS(run) ? { fromS: last.atS } : null;
}

/** Whether a live probe takes the readings at this moment, so that nobody need be asked for one. */
export function isProbeReading(run: Readings, atS: number): boolean {
  return lastOfProbe(run) !== null && openGap(run, atS) === null;
}

/**
 * Where the trace is not joined: within the probe's gaps, but for readings by hand that follow each other as they do by
 * hand.
 *
 * @returns in order of time, none overlapping; s of the run
 */
export function traceGaps({
  readings,
  probeGaps,
}: Pick<HandRun, 'readings' | 'probeGaps'>): { fromS: number; toS: number }[] {
  return probeGaps.flatMap(({ fromS, toS }) => {
    const within = readings.filter(({ atS }) => atS > fromS && atS < toS);
    const edges = [fromS, ...within.map(({ atS }) => atS), toS];
    return edges.slice(1).flatMap((nextS, i) => {
      const isBetweenHands = i > 0 && i < within.length;
      const isJoined = isBetweenHands && nextS - edges[i]! <= JOINED_WITHIN_S;
      return isJoined ? [] : [{ fromS: edges[i]!, toS: nextS }];
    });
  });
}

function newestOfProbe(readings: HandReading[]): HandReading[] {
  const newest: HandReading[] = [];
  for (let i = readings.length - 1; i >= 0 && newest.length < LOOKED_AT; i--) {
    if (readings[i]!.from === 'probe') newest.unshift(readings[i]!);
  }
  return newest;
}
