import type { FittedPart, MachinePage } from '#shared/schemas/homes.ts';
import type { StoredRating } from '#shared/schemas/ratings.ts';
import { fromCelsius, toCelsius } from '#shared/units.ts';
import { ratedWords, unitWords } from './rating-words.ts';

const CYCLING = ['cycling-thermostat', 'thermistor'];
/** A tenth of a degree: as near as a figure rounded in the other unit comes to itself. */
const SAME = 0.1;

/**
 * Where a part that is in the machine differs from what the machine is specified to have, in words.
 * Empty where nothing differs, or where nothing is specified to compare with.
 */
export function describeDifferences({
  specified,
  fitted,
}: Pick<MachinePage, 'specified' | 'fitted'>): string[] {
  const inPlace = fitted.filter(({ removedAtMs }) => removedAtMs === null);
  const thermostats = inPlace.filter(({ rating }) => CYCLING.includes(rating.kind));
  const limits = inPlace.filter(({ rating }) => !CYCLING.includes(rating.kind));
  return [
    ...differing(
      thermostats,
      specified.map(({ rating }) => rating),
    ),
    ...differing(
      limits,
      specified.flatMap(({ limit }) => limit ?? []),
    ),
  ];
}

function differing(parts: FittedPart[], wanted: StoredRating[]): string[] {
  return parts.flatMap(({ rating }) => {
    const comparable = wanted.filter(({ kind }) => kind === rating.kind);
    const [first] = comparable;
    if (!first || comparable.some((other) => isSameRating(rating, other))) return [];
    return [differenceWords(rating, first)];
  });
}

/** A temperature of `rating`, as `unit`. */
function inUnit(temp: number, { unit: from }: StoredRating, unit: StoredRating['unit']) {
  return fromCelsius(toCelsius(temp, from), unit);
}

function isSameRating(fitted: StoredRating, wanted: StoredRating) {
  const isSame = (a: number | null, b: number | null) =>
    a === null || b === null ? a === b : Math.abs(inUnit(a, fitted, wanted.unit) - b) < SAME;
  return isSame(fitted.opens, wanted.opens) && isSame(fitted.closes, wanted.closes);
}

function differenceWords(fitted: StoredRating, wanted: StoredRating) {
  const aboveBy = inUnit(fitted.opens, fitted, wanted.unit) - wanted.opens;
  const size = Math.round(Math.abs(aboveBy) * 10) / 10;
  const unit = unitWords(wanted.unit);
  const how =
    Math.abs(aboveBy) < SAME
      ? 'It opens at the same temperature but closes at another.'
      : `It opens ${size}\u00a0${unit} ${aboveBy > 0 ? 'higher' : 'lower'} than it should.`;
  return `${fitted.name} is fitted (${ratedWords(fitted)}). The machine is specified to have ${wanted.name} (${ratedWords(wanted)}). ${how}`;
}
