import type { ReadProblem } from '../log-reading.ts';
import type { Place } from './place.ts';

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
    message: ({ about, value, say }) => `"${value}" is no answer about ${about}. Possible: ${say}.`,
    hint: 'Give one of those, or none: then it is asked where it matters.',
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
