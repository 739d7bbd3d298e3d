import { bandOf } from '#shared/analysis/judge-point.ts';
import { STEP_S } from '#server/commands/heat-model/simulate-run.ts';
import { trueExtremes } from '#server/commands/heat-model/true-turning-points.ts';
import { SWING_K, type SeenRun } from '../see-run.ts';
import { all, any, over, type How } from './how.ts';
import { middle, type TruePoints } from './true-points.ts';

/** Peaks within this of each other fall alike, and a fall is compared over at least this span, K. */
const ALIKE_K = 5 / 1.8;
const LEAST_SPAN_K = 7 / 1.8;

/** A fall of the true probe, by indexes of the record; `whole` ends in a reset. */
type Fall = { from: number; to: number; whole: boolean };

/**
 * Whether some heat stayed on after the thermostat opened, so far as the definition's own measures show it: the time
 * above the reset band against clean off-times, the rate at equal temperature, or a level stretch.
 */
export function staysOn(seen: SeenRun, points: TruePoints): How {
  const { plan, run } = seen;
  // No plan with a grounded coil begins warm, so that openings are counted from the first.
  const groundS = run.clicksS[plan.faults.groundedAfter - 1];
  if (groundS === undefined) return 'no';
  const falls = fallsOf(seen);
  const clean = falls.filter(({ from, whole }) => whole && from * STEP_S < groundS - 1);
  const kept = falls.filter(({ from }) => from * STEP_S >= groundS - 1);
  return any(
    levels(seen, points, groundS),
    ...kept.map((fall) => any(hangs(fall, clean, seen), slow(fall, clean, seen))),
  );
}

function fallsOf({ run }: SeenRun): Fall[] {
  const extremes = trueExtremes(run, SWING_K);
  return extremes.flatMap(({ kind, index, cause }, i): Fall[] => {
    if (kind !== 'peak' || cause?.cause === 'person' || cause?.cause === 'one-shot') return [];
    const next = extremes[i + 1];
    return [{ from: index, to: next?.index ?? run.probeC.length - 1, whole: next !== undefined }];
  });
}

/** Above the reset band for more than three clean off-times; with none, three times τ·ln of the heating leg. */
function hangs(fall: Fall, clean: Fall[], { run, plan, method }: SeenRun): How {
  const { lowC } = bandOf('reset', plan.rating);
  if (run.probeC[fall.from]! <= lowC) return 'no';
  const hangS = ((firstBelow(run.probeC, fall, lowC) ?? fall.to) - fall.from) * STEP_S;
  const usualS =
    clean.length > 0
      ? middle(clean.map(({ from, to }) => (to - from) * STEP_S))
      : fallByTau(fall, run.probeC, plan.machine.roomC, plan.rating.closesC);
  if (usualS === null) return 'no';
  const seenLate = over(hangS - Math.max(40, 10 * method.spacingS), 15);
  return all(seenLate, over(hangS / usualS - 3, clean.length > 0 ? 0.4 : 0.9));
}

/** τ of the rise before the fall from three of its points a third apart, then τ·ln((peak − room)/(closes − room)). */
function fallByTau(
  fall: Fall,
  probeC: Float64Array,
  roomC: number,
  closesC: number,
): number | null {
  const third = Math.floor(fall.from / 3.5);
  const [a, b, c] = [2.4, 1.2, 0].map((n) => probeC[Math.round(fall.from - 60 - n * third)] ?? NaN);
  const ratio = (b! - a!) / (c! - b!);
  if (!(ratio > 1)) return null;
  const tauS = (1.2 * third * STEP_S) / Math.log(ratio);
  return tauS * Math.log((probeC[fall.from]! - roomC) / (closesC - roomC));
}

/** The same span takes at least 1.7 times as long as a clean fall from a like peak. */
function slow(fall: Fall, clean: Fall[], { run, method }: SeenRun): How {
  const { probeC } = run;
  const hows = clean
    .filter((other) => Math.abs(probeC[other.from]! - probeC[fall.from]!) < ALIKE_K)
    .map((other) => {
      const highC = Math.min(probeC[fall.from]!, probeC[other.from]!);
      const lowC = Math.max(probeC[fall.to]!, probeC[other.to]!);
      const topC = highC - 0.2 * (highC - lowC);
      const footC = lowC + 0.2 * (highC - lowC);
      if (topC - footC < LEAST_SPAN_K) return 'no';
      const ownS = fallTime(probeC, fall, topC, footC);
      const otherS = fallTime(probeC, other, topC, footC);
      if (ownS === null || otherS === null) return 'no';
      const longer = over(ownS - otherS - 10 - method.spacingS, 6 + method.spacingS);
      return all(longer, over(ownS / otherS - 1.75, 0.35));
    });
  return any(...hows);
}

function fallTime(probeC: Float64Array, fall: Fall, topC: number, footC: number): number | null {
  const top = firstBelow(probeC, fall, topC);
  const foot = firstBelow(probeC, fall, footC);
  return top === null || foot === null ? null : (foot - top) * STEP_S;
}

/** The heat that stays holds the exhaust level, over the reset band and under the allowance, to the end. */
function levels({ run, plan }: SeenRun, { probeUK, pointUK }: TruePoints, groundS: number): How {
  const { probeC } = run;
  const lastC = probeC.at(-1)!;
  const { lowC } = bandOf('reset', plan.rating);
  const { highEndC } = bandOf('cut-out', plan.rating);
  const since = probeC.findLastIndex((tempC) => Math.abs(tempC - lastC) > SWING_K);
  const levelS = (probeC.length - 1 - since) * STEP_S;
  const stillOn = (run.switches.at(-1)?.powerW ?? 0) > 0 && run.heatOffS === null;
  if (!stillOn || since * STEP_S < groundS - 200) return 'no';
  return all(
    over(levelS - 160, 60),
    over(lastC - lowC - probeUK, pointUK + 0.5 / 1.8),
    over(highEndC - lastC, pointUK + 0.5 / 1.8),
  );
}

function firstBelow(probeC: Float64Array, { from, to }: Fall, levelC: number): number | null {
  for (let i = from; i <= to; i++) if (probeC[i]! <= levelC) return i;
  return null;
}
