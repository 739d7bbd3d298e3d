import type { ReadProblem, ReadWarning } from './log-reading.ts';

/** Where a problem is and what stands there. `say` is a word or number that its message needs. */
export type Place = {
  row?: number | null;
  column?: string | null;
  value?: string | null;
  say?: string | number;
};

type Words = { message: (at: Place) => string; hint: string };

const EXPORT_HINT = 'Export the readings again as a CSV or text file, and upload that.';

/** Every reason to refuse a file, in words. The code is stable; the words may change. */
export const PROBLEM_WORDS = {
  'empty-file': {
    message: () => 'The file is empty.',
    hint: 'Save the log again from the logger, and check that the copy is not 0 bytes.',
  },
  'spreadsheet-file': {
    message: () => 'This is a spreadsheet file, not a CSV file.',
    hint: 'Open it in the spreadsheet, save the sheet with the readings as CSV, and upload that.',
  },
  'archive-file': {
    message: () => 'This is a packed file, not a log. It was not opened.',
    hint: 'Unpack it first, and upload the log inside.',
  },
  'pdf-file': { message: () => 'This is a PDF file, not a log.', hint: EXPORT_HINT },
  'picture-file': { message: () => 'This is a picture, not a log.', hint: EXPORT_HINT },
  'web-page-file': { message: () => 'This is a web page, not a log.', hint: EXPORT_HINT },
  'json-file': {
    message: () => 'This is a JSON file, not a table of readings.',
    hint: EXPORT_HINT,
  },
  'binary-file': { message: () => 'This is not a text file.', hint: EXPORT_HINT },
  'mixed-encoding': {
    message: ({ row, say }) =>
      `Row ${row} holds a byte that does not belong to the encoding of the rest (byte ${say}).`,
    hint: 'Two files may have been joined, or the copy is damaged. Copy the log again from the logger.',
  },
  'nul-inside': {
    message: ({ row }) => `Row ${row} holds zero bytes: the file is damaged there.`,
    hint: 'Copy the log again from the logger, or cut the damaged rows out.',
  },
  'line-too-long': {
    message: ({ row, say }) => `Row ${row} is longer than ${say} characters.`,
    hint: 'A log has one reading a line. ' + EXPORT_HINT,
  },
  'too-many-columns': {
    message: ({ row, say }) => `Row ${row} has more than ${say} columns.`,
    hint: 'Export only the time and the temperatures.',
  },
  'no-readings': {
    message: () => 'No rows of readings were found.',
    hint: 'The file needs rows with a time and a temperature. ' + EXPORT_HINT,
  },
  'no-clock': {
    message: () => 'No column of times was found.',
    hint: 'Export the readings with their time or with the seconds since the start.',
  },
  'no-temperature': {
    message: () => 'No column of temperatures was found.',
    hint: 'Export the readings with the temperature column, headed with its unit.',
  },
  'too-few-readings': {
    message: ({ say }) => `${say === 1 ? '1 reading' : `${say} readings`}; at least 3 are needed.`,
    hint: 'Check that the logger ran, and that the whole log was copied.',
  },
  'unknown-channel': {
    message: ({ value, say }) => `There is no temperature column "${value}". There are: ${say}.`,
    hint: 'Choose one of the columns that the file has.',
  },
  'unknown-answer': {
    message: ({ column, value, say }) =>
      `"${value}" is no answer about ${column}. Possible: ${say}.`,
    hint: 'Choose one of the answers offered.',
  },
  'column-count': {
    message: ({ row, say }) => `Row ${row} has ${say}.`,
    hint: 'If the readings use decimal commas, export with semicolons between the columns.',
  },
  'number-too-large': {
    message: ({ row, column }) =>
      `Row ${row} of ${column} holds a number too large to be a reading.`,
    hint: 'The file is damaged there. Copy the log again, or cut that row out.',
  },
  'out-of-range': {
    message: ({ row, column, value }) =>
      `${column} reads ${value} in row ${row}: outside −60 to 1000 °F in every unit.`,
    hint: 'These may be raw counts. Export the readings as temperatures.',
  },
  'mixed-units': {
    message: ({ row, column }) =>
      `${column} changes its unit in row ${row}, and not every reading says its own.`,
    hint: 'Split the file where the unit changes, and upload each part.',
  },
  'columns-change': {
    message: ({ row }) => `A second table with other columns begins in row ${row}.`,
    hint: 'Split the file there, and upload each table by itself.',
  },
  'mostly-unreadable': {
    message: ({ row, say }) => `Most rows could not be read; the first is row ${row}: ${say}.`,
    hint: 'Compare that row with the one above it, and export the log again.',
  },
  'unreadable-file': {
    message: ({ value }) => `The file "${value}" could not be opened.`,
    hint: 'Check its name and that you may read it.',
  },
} satisfies Record<string, Words>;

export type ProblemCode = keyof typeof PROBLEM_WORDS;

export function problem(code: ProblemCode, at: Place = {}): ReadProblem {
  const words: Words = PROBLEM_WORDS[code];
  return {
    code,
    message: words.message(at),
    row: at.row ?? null,
    column: at.column ?? null,
    value: at.value ?? null,
    hint: words.hint,
  };
}

/** What was put right or is worth knowing, in words. */
export const WARNING_WORDS = {
  'utf-16-guessed': () => 'Read as UTF-16: the file has no mark that says so.',
  'nul-tail': ({ say }) => `${say} zero bytes at the end were left out.`,
  'truncated-line': ({ row }) => `The last line, row ${row}, is cut off and was set aside.`,
  'no-last-line-end': ({ row }) => `Row ${row}, the last, has no line end: check that it is whole.`,
  reversed: () => 'The file runs from newest to oldest; it was turned round.',
  reordered: ({ say }) => `${say} rows stood out of order and were put in order of time.`,
  'duplicates-dropped': ({ say, row }) =>
    `${say} repeated rows were left out, the first in row ${row}.`,
  'spread-in-stamp': ({ say }) => `Rows with the same stamp were spread evenly within ${say}.`,
  midnight: ({ row }) => `The clock passes midnight in row ${row}.`,
  'clock-change': ({ row, say }) =>
    `The clock is set ${say} in row ${row}; time runs on without the step.`,
  'clock-reset': ({ row }) =>
    `The clock was set anew in row ${row}; time runs on from the row before.`,
  'clock-assumed': ({ say }) => `Times without a unit were read as ${say}.`,
  'date-order-not-needed': () =>
    'Day and month could be either way round; the times of the run are the same in both.',
  'sentinel-excluded': ({ row, value, say }) =>
    `${value} stands for "no reading" and was left out ${say === 1 ? 'once' : `${say} times`}, first in row ${row}.`,
  'open-sensor': ({ row, say }) =>
    `${say === 1 ? '1 row has' : `${say} rows have`} no reading, the first in row ${row}.`,
  'rows-set-aside': ({ row, say }) =>
    `${say === 1 ? '1 row' : `${say} rows`} could not be read, the first is row ${row}.`,
  gap: ({ row, say }) => `Nothing was recorded for ${say} before row ${row}.`,
  'more-gaps': ({ say }) => `${say} more gaps.`,
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

/** Why one row was set aside. */
export const SKIP_WORDS = {
  notANumber: (value: string) => `not a number: ${shown(value)}`,
  noReading: (value: string) => (value === '' ? 'no reading' : `no reading: ${shown(value)}`),
  notATime: (value: string) => `not a time: ${shown(value)}`,
  noTime: () => 'no time',
  cellCount: (have: number, want: number) => `${have} cells where ${want} are expected`,
  unclosedQuote: () => 'a quote is never closed',
  headerAgain: () => 'the header again',
  emptyRow: () => 'empty row',
  cutOff: () => 'the last line is cut off',
  repeated: () => 'repeats an earlier row',
  sentinel: (value: string) => `stands for "no reading": ${shown(value)}`,
  otherRun: () => 'belongs to another run',
};

function shown(value: string): string {
  return value.length > 40 ? `${value.slice(0, 40)}…` : value;
}
