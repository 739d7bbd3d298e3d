import { bandOf } from '#shared/analysis/judge-point.ts';
import type { Rating } from '#shared/analysis/rating.ts';
import { all, any, over, type How, type Sign } from './how.ts';
import { mean, type TruePoint, type TruePoints } from './true-points.ts';

/** How far an estimate may be off beyond its own uncertainty, K (0.2 °F). */
const MODEL_K = 0.2 / 1.8;
/** Standard deviation about the line that a thermostat may have, K. */
const ALLOWED_SD_K = 4 / 1.8;
const LEAST_POINTS = 4;

/** What the judged points say of the thermostat by the definitions. */
export function thermostatSigns(points: TruePoints, rating: Rating): Sign[] {
  return [
    { code: 'drifting', how: drifts(points, rating) },
    { code: 'scattered', how: scatters(points) },
    ...sidesOf('cut-out', points.cutOuts, points, rating),
    ...sidesOf('reset', points.resets, points, rating),
  ];
}

function sidesOf(
  kind: 'cut-out' | 'reset',
  judged: TruePoint[],
  { pointUK, probeUK }: TruePoints,
  rating: Rating,
): Sign[] {
  const [high, low] =
    kind === 'cut-out'
      ? (['opens-high', 'opens-low'] as const)
      : (['closes-high', 'closes-low'] as const);
  if (judged.length === 0) return [];
  const meanUK = pointUK / Math.sqrt(judged.length);
  const { lowC, highC, lowEndC, highEndC } = bandOf(kind, rating);
  const turnC = mean(judged.map(({ tempC }) => tempC));
  const switchC = mean(judged.map(({ switchTempC }) => switchTempC));
  const allowanceK = kind === 'cut-out' ? rating.overshootK : rating.undershootK;
  const turns = beyond(probeUK, meanUK);
  // A switch instant is known less well than the turn it leads to, and its slope makes it worse.
  const switches = beyond(probeUK, 2 * meanUK + 0.5 / 1.8);
  return [
    {
      code: high,
      how: any(turns(turnC - highEndC), atMost(switches(switchC - highC - allowanceK))),
    },
    { code: low, how: any(turns(lowEndC - turnC), atMost(switches(lowC - allowanceK - switchC))) },
  ];
}

/** By the switches alone a run is never *certain*: a record need not show them. */
function atMost(how: How): How {
  return how === 'certain' ? 'possible' : how;
}

/** Outside by more than U, where the estimate itself may be off by its own part of it. */
export function beyond(probeUK: number, ownUK: number): (byK: number) => How {
  const slackK = MODEL_K + ownUK;
  return (byK) =>
    any(
      over(byK - Math.hypot(probeUK, 1.5 * ownUK), slackK) === 'certain' ? 'certain' : 'no',
      over(byK - probeUK, slackK) === 'no' ? 'no' : 'possible',
    );
}

function drifts({ cutOuts, pointUK }: TruePoints, { opensTolK }: Rating): How {
  const n = cutOuts.length;
  if (n < LEAST_POINTS) return 'no';
  const { slopeK, sdK } = lineThrough(cutOuts);
  const errorK = Math.max(sdK, pointUK / 2, 1e-6) / Math.sqrt((n * (n * n - 1)) / 12);
  const errors = Math.abs(slopeK) / errorK;
  const totalK = Math.abs(slopeK) * (n - 1);
  return all(over(totalK - opensTolK, 2 * MODEL_K + pointUK), over(errors - 4.2, 1.4));
}

function scatters({ cutOuts, pointUK }: TruePoints): How {
  if (cutOuts.length < LEAST_POINTS) return 'no';
  return over(lineThrough(cutOuts).sdK - ALLOWED_SD_K, MODEL_K + 0.5 * pointUK);
}

/** Least squares over the order of the points, one step a cycle. */
function lineThrough(points: TruePoint[]): { slopeK: number; sdK: number } {
  const n = points.length;
  const middle = (n - 1) / 2;
  const levelC = mean(points.map(({ tempC }) => tempC));
  const squares = (n * (n * n - 1)) / 12;
  const slopeK =
    points.reduce((sum, { tempC }, i) => sum + (i - middle) * (tempC - levelC), 0) / squares;
  const left = points.reduce(
    (sum, { tempC }, i) => sum + (tempC - levelC - slopeK * (i - middle)) ** 2,
    0,
  );
  return { slopeK, sdK: Math.sqrt(left / (n - 2)) };
}
