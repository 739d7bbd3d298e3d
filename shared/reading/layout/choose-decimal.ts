import type { Decimal } from '../cells/parse-number.ts';
import { plain } from '../cells/parse-number.ts';
import type { Answers } from '../log-reading.ts';
import type { QuestionDraft } from '../outcome/question-draft.ts';
import type { Delimiter } from '../text/split-cells.ts';
import type { SampleColumn } from './find-table.ts';

/** No exhaust, and no unit, makes a reading above this. */
const HOTTEST = 1300;

/** The file's decimal mark; a question where a mark may group thousands and both make sense. */
export function chooseDecimal(
  columns: SampleColumn[],
  delimiter: Delimiter,
  answers: Answers,
): Decimal | QuestionDraft {
  if (answers.decimal === 'comma') return ',';
  if (answers.decimal === 'point') return '.';
  const marks = countMarks(columns);
  if (marks.decimalComma > 0 && marks.decimalComma >= marks.decimalPoint) return ',';
  if (marks.decimalPoint > 0 || marks.eitherComma === 0) return '.';
  // "70,125": three digits after every comma. As thousands it is 70 125, which no probe reads.
  if (marks.largest > HOTTEST || delimiter === ',') return marks.largest > HOTTEST ? ',' : ask();
  return ask();
}

type Marks = { decimalComma: number; decimalPoint: number; eitherComma: number; largest: number };

function countMarks(columns: SampleColumn[]): Marks {
  const marks: Marks = { decimalComma: 0, decimalPoint: 0, eitherComma: 0, largest: 0 };
  for (const { kind, cells } of columns) {
    if (kind !== 'number') continue;
    for (const cell of cells) countCell(marks, plain(cell));
  }
  return marks;
}

function countCell(marks: Marks, text: string): void {
  const either = /^[+-]?(\d{1,3}),(\d{3})\D*$/.exec(text);
  if (either) {
    marks.eitherComma++;
    marks.largest = Math.max(marks.largest, Number(either[1]! + either[2]!));
  } else if (/^[+-]?[\d.]*,\d*(?!.*\d)/.test(text)) {
    marks.decimalComma++;
  } else if (/^[+-]?[\d,]*\.\d*(?!.*\d)/.test(text)) {
    marks.decimalPoint++;
  }
}

function ask(): QuestionDraft {
  return {
    about: 'decimal',
    message: 'Is the comma a decimal mark, or does it part thousands?',
    options: [
      { answer: 'comma', label: 'decimal mark' },
      { answer: 'point', label: 'parts thousands' },
    ],
  };
}
