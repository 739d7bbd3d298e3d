/** For `register`: what stands in a number field; empty is null, anything unreadable NaN, which the schema refuses. */
export const typedNumber = {
  setValueAs: (typed: unknown) => readNumber(typed),
};

/** Takes a decimal comma as well as a point. */
export function readNumber(typed: unknown): number | null {
  if (typeof typed === 'number') return typed;
  if (typeof typed !== 'string' || typed.trim() === '') return null;
  return Number(typed.trim().replace(',', '.').replace('−', '-'));
}
