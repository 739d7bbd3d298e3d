/** What is typed figure by figure under *Other value*: below zero, tenths, or anything that two figures cannot say. */

const MOST_FIGURES = 5;

/** One more key of the free entry; a key that cannot stand there changes nothing. */
export function typeOther(text: string, key: string): string {
  if (key === '-') return text === '' ? '-' : text;
  if (key === '.') return text.includes('.') || !/[0-9]$/.test(text) ? text : `${text}.`;
  const figures = text.replace(/[^0-9]/g, '').length;
  const hasTenth = /\.[0-9]$/.test(text);
  return /^[0-9]$/.test(key) && figures < MOST_FIGURES && !hasTenth ? text + key : text;
}

/** @returns null while it is no number yet */
export function otherValueOf(text: string): number | null {
  if (!/^-?[0-9]+(\.[0-9])?$/.test(text)) return null;
  // -0 would be written as 0 and read as something else.
  return Number(text) + 0;
}
