import { bandOf } from '#shared/analysis/judge-point.ts';
import { STEP_S } from '#server/commands/heat-model/simulate-run.ts';
import { trueExtremes } from '#server/commands/heat-model/true-turning-points.ts';
import { SWING_K, type SeenRun } from '../see-run.ts';
import { all, any, over, type How, type Sign } from './how.ts';
import { staysOn } from './stays-on.ts';
import { middle, type TruePoints } from './true-points.ts';

const MODEL_K = 0.3 / 1.8;
/** A rise is another thing than the machine's own cut-outs up there where it passes them by this, K. */
const BEYOND_OWN_K = 3 / 1.8;
/** How far under the reset band, or the machine's own resets, a fall is surely for good, K. */
const FOR_GOOD_K = 12 / 1.8;

/** What the run says of heat that goes on, stays, goes for good or is cut by something upstream. */
export function heatSigns(seen: SeenRun, points: TruePoints): Sign[] {
  const runaway = runsAway(seen, points);
  const stays = staysOn(seen, points);
  return [
    { code: 'runaway', how: runaway },
    // Heat that went past the allowance is a runaway; that the thermostat had opened may be said beside it.
    { code: 'heat-stays-on', how: runaway === 'certain' && stays !== 'no' ? 'possible' : stays },
    { code: 'heat-lost', how: isLost(seen, points) },
    { code: 'limit-cycling', how: cyclesOnLimit(seen, points) },
  ];
}

/** A rise that nothing but a person, a one-shot part or the record's end turned. */
function runsAway(seen: SeenRun, points: TruePoints): How {
  const { highEndC } = bandOf('cut-out', seen.plan.rating);
  const slackK = MODEL_K + points.pointUK;
  const upThere = points.allCutOuts.filter(({ tempC }) => tempC > highEndC);
  const ownC = Math.max(-Infinity, ...upThere.map(({ tempC }) => tempC));
  const ends = unendedRises(seen).map(({ tempC, surelyC }) => {
    if (tempC >= seen.plan.rating.highLimitC + slackK) return 'certain';
    const beyondOwn = over(surelyC - ownC - BEYOND_OWN_K - points.probeUK, BEYOND_OWN_K);
    return all(
      beyondOwn,
      any(
        over(surelyC - highEndC - points.probeUK, slackK) === 'certain' ? 'certain' : 'no',
        over(tempC - highEndC - points.probeUK, slackK) === 'no' ? 'no' : 'possible',
      ),
    );
  });
  return any(...ends, lonePeak(points, highEndC, slackK));
}

/** Tops of rises that the machine itself did not end; `surelyC` is what it had reached when a person stepped in. */
function unendedRises({ run }: SeenRun): { tempC: number; surelyC: number }[] {
  const extremes = trueExtremes(run, SWING_K);
  const tops = extremes
    .filter(
      ({ kind, cause }) =>
        kind === 'peak' && (cause?.cause === 'person' || cause?.cause === 'one-shot'),
    )
    .map(({ tempC, cause }) => ({
      tempC,
      surelyC: run.probeC[Math.round(Math.max(0, cause!.timeS) / STEP_S)] ?? tempC,
    }));
  const last = extremes.at(-1);
  if (last?.kind === 'peak') return tops;
  const highestC = run.probeC
    .subarray(last?.index ?? 0)
    .reduce((high, tempC) => Math.max(high, tempC), -Infinity);
  return [...tops, { tempC: highestC, surelyC: highestC }];
}

/** The only cut-out up there, with no return after it. */
function lonePeak(
  { allCutOuts, resets, probeUK }: TruePoints,
  highEndC: number,
  slackK: number,
): How {
  const last = allCutOuts.at(-1);
  if (!last || resets.some(({ timeS }) => timeS > last.timeS)) return 'no';
  if (allCutOuts.some((point) => point !== last && point.tempC > highEndC)) return 'no';
  return over(last.tempC - highEndC - probeUK, slackK);
}

/** Something opened for good, or the timer ended the heat, and the record follows the fall far enough. */
function isLost({ plan, run }: SeenRun, { resets, probeUK, pointUK }: TruePoints): How {
  const endS = (run.probeC.length - 1) * STEP_S;
  const lost =
    run.switches.some(({ cause }) => cause === 'one-shot') || plan.faults.opensForGoodS < endS;
  if (!lost || run.heatOffS !== null) return 'no';
  const lastC = run.probeC.at(-1)!;
  const { lowC } = bandOf('reset', plan.rating);
  const ownC = Math.min(lowC, ...resets.map(({ tempC }) => tempC));
  const goneC = resets.length > 0 ? ownC - FOR_GOOD_K : lowC - 0.5 * (lowC - plan.machine.roomC);
  if (lastC < goneC - probeUK - pointUK) return 'certain';
  return lastC < lowC + pointUK ? 'possible' : 'no';
}

/** Cut again and again before the band, by short swings. */
function cyclesOnLimit({ plan, run }: SeenRun, points: TruePoints): How {
  const { allCutOuts, resets, probeUK, pointUK } = points;
  if (allCutOuts.length < 3 || resets.length < 2) return 'no';
  const { lowC } = bandOf('cut-out', plan.rating);
  const slackK = MODEL_K + 1.3 * pointUK;
  const below = allCutOuts.map(({ tempC }) => over(lowC - probeUK - tempC, slackK));
  const share = (least: How) =>
    below.filter((how) => how === 'certain' || how === least).length / below.length;
  const swings = resets.map(({ tempC, timeS }) => {
    const next = allCutOuts.find((cutOut) => cutOut.timeS > timeS);
    return next ? next.tempC - tempC : NaN;
  });
  const ratedK = plan.rating.opensC - plan.rating.closesC;
  const ratio = middle(swings.filter(Number.isFinite)) / ratedK;
  const short = over(0.7 - ratio, 0.05 + (1.3 * pointUK) / ratedK);
  const byLimit = run.switches.filter(({ cause }) => cause === 'limit').length > 2;
  if (share('certain') > 0.9 && allCutOuts.length > 3 && short === 'certain') return 'certain';
  return share('possible') >= 0.5 && (short !== 'no' || byLimit) ? 'possible' : 'no';
}
