import { expect } from 'vitest';
import type { Answers, ReadProblem, ReadQuestion } from '#shared/reading/log-reading.ts';
import { readText } from '../read-text.ts';

/** One odd file and what is to come of it: a reading with its warnings and rows set aside, a question, or a refusal. */
export type Odd = {
  /** Row of the list of odd inputs. */
  row: number;
  what: string;
  file: string | Uint8Array;
  answers?: Answers;
  /** Times in s and readings as recorded. */
  t?: number[];
  temp?: number[];
  unit?: 'F' | 'C' | 'K';
  /** Codes that must stand among the warnings. */
  warns?: string[];
  /** Rows set aside, all of them. */
  aside?: number[];
  asks?: { about: ReadQuestion['about']; options: string[] };
  refused?: Partial<ReadProblem>;
};

/** Holds what was read of an odd file against what is to be, in every part that is stated. */
export function checkOdd(odd: Odd): void {
  const outcome = readText(odd.file, { answers: odd.answers ?? {} });
  if (odd.refused) {
    expect(outcome).toMatchObject({ kind: 'refused', problem: odd.refused });
    return;
  }
  if (odd.asks) {
    expect(outcome).toMatchObject({ kind: 'question', question: { about: odd.asks.about } });
    if (outcome.kind !== 'question') return;
    expect(outcome.question.options.map(({ answer }) => answer)).toEqual(odd.asks.options);
    return;
  }
  if (outcome.kind !== 'read') throw new Error(`not read: ${JSON.stringify(outcome)}`);
  const { series, temps, warnings, skippedRows, channelUnit } = outcome.reading;
  if (odd.t) expect(Array.from(series.timesS)).toEqual(odd.t);
  if (odd.temp) expect(Array.from(temps)).toEqual(odd.temp);
  if (odd.unit) expect(channelUnit).toBe(odd.unit);
  const codes = warnings.map(({ code }) => code);
  expect(codes).toEqual(expect.arrayContaining(odd.warns ?? []));
  if (odd.warns?.length === 0) expect(codes).toEqual([]);
  if (odd.aside) expect(skippedRows.map(({ row }) => row)).toEqual(odd.aside);
}

export const HEADER = 'Elapsed (s),Exhaust °F';
export const T = [0, 10, 20];
export const TEMP = [70.1, 74.5, 80.25];

/** A log of these rows under the usual header. */
export function log(...rows: string[]): string {
  return `${HEADER}\n${rows.join('\n')}\n`;
}

/** Three stamps with the usual readings. */
export function stamped(stamps: string[], header = 'Time,Exhaust °F'): string {
  const [delimiter = ','] = /[,;]/.exec(header) ?? [];
  return `${[header, ...stamps.map((stamp, i) => `${stamp}${delimiter}${TEMP[i] ?? 80 + i}`)].join('\n')}\n`;
}
