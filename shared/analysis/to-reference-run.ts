import type { Analysis, Leg, ReferenceRun } from './analysis.ts';
import { median } from './statistics/quantile.ts';

/** A leg's turn and its point are of one instant, s. */
const SAME_INSTANT_S = 0.5;

/**
 * What a clean run gives others of the same machine and heat setting to go by: middle values over its complete cycles,
 * and its fall of middle τ. Medians, so that one odd cycle does not set the measure.
 *
 * @param isSameAir whether the air went the same way (duct on or off) as in the run to be judged: falls compare only then
 * @returns null where the run is not clean (its one finding is `in-band`) or has no complete cycle
 */
export function toReferenceRun(analysis: Analysis, isSameAir: boolean): ReferenceRun | null {
  const { findings, cycles } = analysis;
  if (findings.length !== 1 || findings[0]?.code !== 'in-band' || cycles.length === 0) return null;
  return {
    cycles: cycles.length,
    onS: median(cycles.map(({ onS }) => onS)),
    offS: median(cycles.map(({ offS }) => offS)),
    swingK: median(cycles.map(({ swingK }) => swingK)),
    fall: isSameAir ? middleFall(analysis) : null,
  };
}

function middleFall(analysis: Analysis): ReferenceRun['fall'] {
  const falls = analysis.legs
    .flatMap((leg) => fallOf(leg, analysis) ?? [])
    .sort((a, b) => a.tauS - b.tauS);
  return falls[Math.floor((falls.length - 1) / 2)] ?? null;
}

/** A fitted fall from a cut-out to a reset; null for any other leg. */
function fallOf(leg: Leg, { cutOuts, resets }: Analysis): NonNullable<ReferenceRun['fall']> | null {
  if (leg.kind !== 'cooling' || leg.asymptoteC === null || leg.tauS === null) return null;
  const isAt = (atS: number) => (point: { timeS: number }) =>
    Math.abs(point.timeS - atS) < SAME_INSTANT_S;
  const from = cutOuts.find(isAt(leg.fromS));
  const to = resets.find(isAt(leg.toS));
  if (!from || !to || leg.asymptoteC >= to.tempC) return null;
  return { fromC: from.tempC, toC: to.tempC, asymptoteC: leg.asymptoteC, tauS: leg.tauS };
}
