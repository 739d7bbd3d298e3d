import type { ReadWarning } from '../log-reading.ts';
import type { Place } from './place.ts';

/** What was put right or is worth knowing, in words. */
export const WARNING_WORDS = {
  'utf-16-guessed': () => 'Read as UTF-16: the file has no mark that says so.',
  'nul-tail': ({ say }) =>
    `${say === 1 ? '1 zero byte at the end was' : `${say} zero bytes at the end were`} left out.`,
  'truncated-line': ({ row }) => `The last line, row ${row}, is cut off and was set aside.`,
  'no-last-line-end': ({ row }) => `Row ${row}, the last, has no line end: check that it is whole.`,
  reversed: () => 'The file runs from newest to oldest; it was turned round.',
  reordered: ({ say }) =>
    `${say === 1 ? '1 row' : `${say} rows`} stood out of order and ${say === 1 ? 'was' : 'were'} put in order of time.`,
  'duplicates-dropped': ({ say, row }) =>
    say === 1
      ? `Row ${row} repeats an earlier row and was left out.`
      : `${say} repeated rows were left out, the first in row ${row}.`,
  'spread-in-stamp': ({ say }) => `Rows with the same stamp were spread evenly within ${say}.`,
  midnight: ({ row }) => `The clock passes midnight in row ${row}.`,
  'clock-change': ({ row, say }) =>
    `The clock is set ${say} in row ${row}; time runs on without the step.`,
  'clock-reset': ({ row }) =>
    `The clock was set anew in row ${row}; time runs on from the row before.`,
  'clock-assumed': ({ say }) => `Times without a unit were read as ${say}.`,
  'date-order-not-needed': () =>
    'Day and month could be either way round; the times of the run are the same in both.',
  'signal-converted': ({ column, value, say }) =>
    `${column} holds ${value === 'mV' ? 'mV' : value === 'kohm' ? 'kilohms' : 'ohms'}. It was converted to °C as ${say}.`,
  'sentinel-excluded': ({ row, value, say }) =>
    `${value} stands for "no reading" and was left out ${say === 1 ? 'once' : `${say} times`}, first in row ${row}.`,
  'open-sensor': ({ row, say }) =>
    `${say === 1 ? '1 row has' : `${say} rows have`} no reading, the first in row ${row}.`,
  'rows-set-aside': ({ row, say }) =>
    `${say === 1 ? '1 row' : `${say} rows`} could not be read, the first is row ${row}.`,
  'uneven-step': ({ row, value, say }) =>
    `${value === '1' ? '1 time is' : `${value} times are`} off the even step of ${say}, the first in row ${row}: check it.`,
  'readings-missing': ({ row, value, say }) =>
    `Readings are missing in ${value === '1' ? '1 place' : `${value} places`} of the even step of ${say}, the first before row ${row}.`,
  'stands-out': ({ row, value, say }) =>
    say === 1
      ? `Row ${row} reads ${value}, far from the readings beside it: check it.`
      : `${say} readings lie far from those beside them, the first in row ${row}: ${value}.`,
  'odd-form': ({ row, column, value, say }) =>
    `${say === 1 ? '1 reading' : `${say} readings`} of ${column} ${say === 1 ? 'has' : 'have'} not the ${value} decimals of the others, the first in row ${row}: check it.`,
  'unit-doubtful': ({ column, value, say }) =>
    `${column} was read in ${value === 'K' ? 'K' : `°${value}`} as the file says; its readings look more like ${say}.`,
  'clock-doubtful': ({ say }) =>
    `By the clock of the file a reading comes every ${say}: check the unit of its times.`,
  gap: ({ row, say }) => `Nothing was recorded for ${say} before row ${row}.`,
  'more-gaps': ({ say }) => `There ${say === 1 ? 'is 1 more gap' : `are ${say} more gaps`}.`,
  'header-repeated': ({ row, say }) =>
    say === 1
      ? `The header comes again once, in row ${row}.`
      : `The header comes again ${say} times, first in row ${row}.`,
  'units-converted': ({ row, value }) =>
    `Readings in another unit were converted to °${value}, the first in row ${row}.`,
  'channels-disagree': ({ row, say }) => `${say} should agree and do not, first in row ${row}.`,
  'no-change': ({ say }) => `${say} does not change in the whole record.`,
  'channel-chosen': ({ column, say }) => `${column} was taken as the run; there is also ${say}.`,
  'interval-used': ({ say }) => `Times were counted from one reading every ${say}.`,
  scaled: ({ say }) => `The readings were taken as ${say}.`,
  'unit-from-letter': ({ column }) =>
    `The degree sign of ${column} is damaged; its letter was used.`,
} satisfies Record<string, (at: Place) => string>;

export type WarningCode = keyof typeof WARNING_WORDS;

export function warning(code: WarningCode, at: Place = {}): ReadWarning {
  const words: (at: Place) => string = WARNING_WORDS[code];
  return { code, row: at.row ?? null, message: words(at) };
}
