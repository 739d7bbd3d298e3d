import { DATE_ORDER_ANSWERS } from '../clock/date-order.ts';
import type { Answers, QuestionSubject, ReadProblem } from '../log-reading.ts';
import { SENSOR_ANSWERS } from '../signals/signal.ts';
import { SCALE_ANSWERS } from '../tidy/choose-scale.ts';
import { problem } from '../words/problem-words.ts';

/** What may be said about each subject. A channel is held against the file's own columns, later. */
const POSSIBLE: Partial<Record<QuestionSubject, string[]>> = {
  unit: ['F', 'C', 'K', ...SENSOR_ANSWERS],
  'date-order': DATE_ORDER_ANSWERS,
  decimal: ['comma', 'point'],
  clock: [
    'seconds',
    'minutes',
    'hours',
    'milliseconds',
    'm:ss',
    'h:mm',
    'h:mm:ss',
    '12-hour',
    '1900',
    '1904',
  ],
  scale: SCALE_ANSWERS,
  encoding: ['utf-8', 'windows-1252'],
};

/** The first answer that no question of its subject has; null where every one could fit. */
export function refuseAnswers(answers: Answers): ReadProblem | null {
  for (const [about, possible] of Object.entries(POSSIBLE)) {
    const value = answers[about as QuestionSubject];
    if (value !== undefined && !possible.includes(value)) {
      return problem('unknown-answer', { about, value, say: possible.join(', ') });
    }
  }
  const { interval, runs } = answers;
  if (interval !== undefined && !(Number(interval) > 0 && Number(interval) < Infinity)) {
    return problem('unknown-answer', {
      about: 'interval',
      value: interval,
      say: 'a number of seconds above 0',
    });
  }
  if (runs !== undefined && !/^[1-9]\d*$/.test(runs)) {
    return problem('unknown-answer', { about: 'runs', value: runs, say: 'the number of a run' });
  }
  return null;
}
