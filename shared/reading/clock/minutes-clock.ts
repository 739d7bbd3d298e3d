import type { SampleColumn } from '../layout/find-table.ts';
import type { ClockInput, ClockResult } from './choose-clock.ts';

type Fields = { first: number; second: number };

/**
 * Times of two fields: minutes and seconds, or hours and minutes. A run of a dryer lasts minutes to
 * hours and is read every few seconds, so the step decides in most files; else the person does.
 */
export function minutesClock(input: ClockInput, column: SampleColumn): ClockResult {
  const answer = input.answers.clock;
  if (answer === 'm:ss') return asForm(column, answer);
  // the other two answer a later question, about hours
  if (answer === 'h:mm' || answer === 'h:mm:ss' || answer === '12-hour') {
    return asForm(column, 'h:mm');
  }
  const title = input.titles[column.index]!.toLowerCase();
  if (/m+:ss|min.*sec|elapsed|stop.?watch|since|run.?time/.test(title))
    return asForm(column, 'm:ss');
  if (/h+:mm|time of day|clock|uhrzeit|local/.test(title)) return asForm(column, 'h:mm');
  const head = column.cells.slice(0, column.headCells);
  if (head.some((cell) => /[.,]\d+$/.test(cell))) return asForm(column, 'm:ss');
  if (head.some((cell) => /[ap]\.?\s?m\.?$/i.test(cell))) return asForm(column, 'h:mm');
  const form = formOf(fieldsOf(column.cells), fieldsOf(head));
  return form ? asForm(column, form) : askForm();
}

function formOf(all: Fields[], head: Fields[]): 'm:ss' | 'h:mm' | null {
  if (all.some(({ first }) => first > 24)) return 'm:ss';
  const start = head[0];
  if (!start) return null;
  // a stopwatch starts at nought; nobody starts a run at midnight and reads it every quarter of an hour
  if (start.first === 0 && start.second < 60) return 'm:ss';
  const repeated = head.filter((f, i) => i > 0 && same(f, head[i - 1]!)).length;
  return repeated > head.length * 0.3 ? 'h:mm' : null;
}

function same(a: Fields, b: Fields): boolean {
  return a.first === b.first && a.second === b.second;
}

function fieldsOf(cells: string[]): Fields[] {
  const fields: Fields[] = [];
  for (const cell of cells) {
    const match = /^(\d{1,3}):(\d{2})/.exec(cell);
    if (match) fields.push({ first: Number(match[1]), second: Number(match[2]) });
  }
  return fields;
}

function asForm(column: SampleColumn, form: 'm:ss' | 'h:mm'): ClockResult {
  const hoursFirst = form === 'h:mm';
  return {
    kind: 'clock',
    clock: { kind: 'minutes', column: column.index, hoursFirst },
    words: hoursFirst ? 'time of day h:mm' : 'elapsed m:ss',
    orders: [],
    warnings: [],
  };
}

function askForm(): ClockResult {
  return {
    kind: 'question',
    question: {
      about: 'clock',
      message: 'The times have two parts. Are they minutes and seconds, or hours and minutes?',
      options: [
        { answer: 'm:ss', label: 'minutes and seconds' },
        { answer: 'h:mm', label: 'hours and minutes' },
      ],
    },
  };
}
