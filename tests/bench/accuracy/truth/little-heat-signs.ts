import { bandOf } from '#shared/analysis/judge-point.ts';
import { STEP_S } from '#server/commands/heat-model/simulate-run.ts';
import { nothingOpening, unattended } from '../machines.ts';
import type { SeenRun } from '../see-run.ts';
import { all, atMostPossible, not, over, type How, type Sign } from './how.ts';
import type { TruePoints } from './true-points.ts';

/** Rise that a heater surely passes in five minutes, K (15 °F), and what noise may hide of it, K. */
const LEAST_RISE_K = 15 / 1.8;
const LEAST_S = 300;

/** Levels off under the band, or hardly any rise. */
export function littleHeatSigns(seen: SeenRun, points: TruePoints): Sign[] {
  const { run } = seen;
  const turned = points.allCutOuts.length > 0 || run.heatOffS !== null;
  const lost = run.switches.some(({ cause }) => cause === 'one-shot');
  if (turned || lost) return [];
  const noHeat = risesLittle(seen);
  const below = levelsBelow(seen, points);
  return [
    { code: 'below-cut-out', how: all(below, not(noHeat)) },
    { code: 'no-heat', how: noHeat },
  ];
}

function risesLittle({ plan, run, method }: SeenRun): How {
  if (plan.recordFromS > 0) return 'no';
  const riseK = Math.max(...run.probeC) - run.probeC[0]!;
  const slackK = 0.4 / 1.8 + method.pointUK;
  const seconds = (run.probeC.length - 1) * STEP_S;
  return all(over(seconds - LEAST_S, 2 + method.spacingS), over(LEAST_RISE_K - riseK, slackK));
}

/** Where the exhaust would stay if nobody ended the record, and whether the record shows it. */
function levelsBelow({ plan, run, method }: SeenRun, { probeUK }: TruePoints): How {
  if (plan.load === 'damp') return 'no';
  const levelC = unattended(nothingOpening(plan.machine), plan.faults, 5000).outletC.at(-1)!;
  const { lowC } = bandOf('cut-out', plan.rating);
  const roomK = lowC - probeUK - levelC;
  const below = over(roomK, 0.5 / 1.8 + method.pointUK);
  const toComeK = levelC - run.probeC.at(-1)!;
  const shown = toComeK < Math.max(2 / 1.8, 0.4 * roomK);
  // A record too short to show where it levels off is too short to say so.
  return shown ? below : atMostPossible(below);
}
