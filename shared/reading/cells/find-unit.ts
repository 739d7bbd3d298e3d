import type { TemperatureUnit } from '../../units.ts';

/**
 * Degree signs as they arrive: the sign itself, the ordinal and ring that stand in for it, and what
 * code page 437 (0xF8) and Mac Roman (0xA1) make of it when read as Windows-1252.
 */
const DEGREE = '[°º˚ø¡]';
const SIGNED = new RegExp(`${DEGREE}\\s*([FCK])(?![A-Za-z])`, 'i');
const WORD = /\bdeg(?:rees?|s)?[\s._]*([FCK])(?![A-Za-z])/i;
const NAME = /(?<![A-Za-z])(fahrenheit|celsius|centigrade|kelvin)(?![A-Za-z])/i;
const BRACKETED = /[([{]\s*([FCKfck])\s*[)\]}]/;
const ENDING = /(?:^|[\s_\-/,.]|[a-z](?=[FCK]$))([FCKfck])$/;
/** A letter after these words is a label or a thermocouple type, not a unit. */
const LABELLED = /(channel|sensor|probe|port|input|zone|type|couple|tc|ch|phase)[\s_\-/.]*[a-z]$/i;

/** The temperature unit that a header or a unit row states; null where it states none. */
export function findUnit(text: string): TemperatureUnit | null {
  if (/℉/.test(text)) return 'F';
  // U+2103, and its two-byte forms of GBK and Shift-JIS read as Windows-1252
  if (/℃|¡æ|\u0081[Ž\u008e]/.test(text)) return 'C';
  const named = NAME.exec(text);
  if (named) return unitLetter(named[1]!);
  const letter = SIGNED.exec(text) ?? WORD.exec(text) ?? BRACKETED.exec(text);
  if (letter) return unitLetter(letter[1]!);
  const ending = LABELLED.test(text) ? null : ENDING.exec(text.trim());
  return ending ? unitLetter(ending[1]!) : null;
}

/** The unit that a line above the table states ("Units: F", "Temperature unit;Celsius"). */
export function findPreambleUnit(line: string): TemperatureUnit | null {
  const stated = /\b(?:units?|scale|einheit|unit[ée]s?|eenheid)\b(.*)/i.exec(line);
  if (stated) {
    const letter = /(?<![A-Za-z])([FCK])(?![A-Za-z])/.exec(stated[1]!);
    const found = findUnit(stated[1]!) ?? (letter ? unitLetter(letter[1]!) : null);
    if (found) return found;
  }
  const signed = SIGNED.exec(line) ?? /(?<![A-Za-z])(fahrenheit|celsius)(?![A-Za-z])/i.exec(line);
  return signed ? unitLetter(signed[1]!) : null;
}

export function unitLetter(text: string): TemperatureUnit {
  const first = text[0]!.toUpperCase();
  return first === 'F' || first === 'K' ? first : 'C';
}

/** The unit at the end of a cell ("70.1 °F", "21,2C"); what stands before it is the number. */
export const CELL_UNIT =
  /\s*(?:(?:°|º|˚|ø|¡|deg\.?|degrees?)\s*([FCK])|(℃|℉)|([FCK])|(fahrenheit|celsius|kelvin))\.?$/i;

export function cellUnit(match: RegExpExecArray): TemperatureUnit {
  if (match[2]) return match[2] === '℉' ? 'F' : 'C';
  return unitLetter(match[1] ?? match[3] ?? match[4]!);
}
