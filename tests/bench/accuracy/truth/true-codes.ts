import { FINDING_CODES, type FindingCode } from '#shared/analysis/analysis.ts';
import type { TrueTurn } from '#server/commands/heat-model/true-turning-points.ts';
import type { SeenRun } from '../see-run.ts';
import { heatSigns } from './heat-signs.ts';
import { atMostPossible, over, type How, type Sign } from './how.ts';
import { littleHeatSigns } from './little-heat-signs.ts';
import { thermostatSigns } from './thermostat-signs.ts';
import { middle, truePoints, type TruePoints } from './true-points.ts';
import { unnamedCodes } from './unnamed-codes.ts';

/** What is right to find in a run. */
export type TrueCodes = {
  /** Must be there. Empty where the truth lies near a limit: then one of the allowed must be. */
  expected: FindingCode[];
  /** May be there beside or, where nothing is expected, instead. */
  allowed: FindingCode[];
  /** Right first codes. */
  headlines: FindingCode[];
  /** Nothing is wrong, and nothing lies near a limit. */
  sound: boolean;
  /** Something with a name is surely wrong. */
  faulty: boolean;
};

/**
 * What a run's noise-free record and its causes say by the definitions of the findings. Where a turn lies so near the
 * swing threshold that it may be missed, what holds with and without it is expected, the rest allowed.
 */
export function trueCodes(seen: SeenRun): TrueCodes {
  const variants = [seen.turns, ...nearTurns(seen)].map((turns) => codesWith(seen, turns));
  const expected = FINDING_CODES.filter((code) =>
    variants.every((each) => each.expected.includes(code)),
  );
  const allowed = FINDING_CODES.filter(
    (code) =>
      !expected.includes(code) &&
      variants.some((each) => each.expected.includes(code) || each.allowed.includes(code)),
  );
  const first = expected[0];
  const headlines = FINDING_CODES.filter(
    (code) => code === first || (allowed.includes(code) && (!first || comesBefore(code, first))),
  );
  return {
    expected,
    allowed,
    headlines,
    sound: expected[0] === 'in-band' && allowed.length === 0,
    faulty: first !== undefined && !UNNAMED.includes(first),
  };
}

export const UNNAMED: FindingCode[] = ['mixed', 'too-close', 'too-short', 'in-band'];

function comesBefore(code: FindingCode, other: FindingCode): boolean {
  return FINDING_CODES.indexOf(code) < FINDING_CODES.indexOf(other);
}

/** Other sets of turns that may be found as rightly: without, or with, those near the swing threshold. */
function nearTurns({ turns, needed, accepted }: SeenRun): TrueTurn[][] {
  const others: TrueTurn[][] = [];
  if (needed.length !== turns.length) others.push(needed);
  if (accepted.length !== turns.length) others.push(accepted);
  return others;
}

function codesWith(seen: SeenRun, turns: TrueTurn[]) {
  const points = truePoints(seen, turns);
  const slow = isTooSlow(seen, points);
  const heat = [...heatSigns(seen, points), ...littleHeatSigns(seen, points)];
  const limit = heat.find(({ code }) => code === 'limit-cycling')?.how ?? 'no';
  const thermostat = slow === 'certain' ? [] : thermostatSigns(points, seen.plan.rating);
  // A limit that cuts first says nothing of the thermostat, though its points lie where they lie; a slow probe neither.
  const doubted = limit !== 'no' || slow !== 'no';
  const signs = [...heat, ...thermostat.map((sign) => (doubted ? doubt(sign) : sign))];
  const certain = codesOf(signs, 'certain');
  const possible = codesOf(signs, 'possible');
  if (certain.length > 0) return { expected: certain, allowed: possible };
  const outside = limit !== 'no' && codesOf(thermostat, 'certain').length > 0;
  const unnamed = unnamedFor(slow, points, seen).filter((code) => !outside || code === 'too-short');
  if (possible.length === 0 && unnamed.length === 1) return { expected: unnamed, allowed: [] };
  return { expected: [], allowed: [...possible, ...unnamed] };
}

function codesOf(signs: Sign[], wanted: How): FindingCode[] {
  return signs.filter(({ how }) => how === wanted).map(({ code }) => code);
}

function doubt({ code, how }: Sign): Sign {
  return { code, how: atMostPossible(how) };
}

function unnamedFor(slow: How, points: TruePoints, { plan }: SeenRun): FindingCode[] {
  if (slow === 'certain') return ['too-short'];
  const codes = unnamedCodes(points, plan.rating);
  return slow === 'possible' && !codes.includes('too-short') ? ['too-short', ...codes] : codes;
}

/** The probe's known response time is over a quarter of the on-time: the points say nothing. */
function isTooSlow({ plan, responseS }: SeenRun, { allCutOuts, resets }: TruePoints): How {
  if (!plan.tellsResponse) return 'no';
  const onS = resets.flatMap(({ timeS }) => {
    const next = allCutOuts.find((cutOut) => cutOut.timeS > timeS);
    return next ? [next.timeS - timeS] : [];
  });
  return onS.length === 0 ? 'no' : over(responseS / middle(onS) - 0.25, 0.03);
}
