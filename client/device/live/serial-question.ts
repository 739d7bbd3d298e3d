import type { SerialAnswers, SerialQuestion } from '#shared/probes/live/read-serial-line.ts';
import type { LiveQuestion } from './live-probe.ts';

/** What is asked of a line, with the line as it stands. */
export function wordQuestion(question: SerialQuestion): LiveQuestion {
  const line = `“${question.line.trim().slice(0, 60)}”`;
  switch (question.about) {
    case 'unit':
      return {
        words: `The probe says ${line}. In which unit is ${question.number}?`,
        options: [
          { key: 'F', words: '°F' },
          { key: 'C', words: '°C' },
        ],
      };
    case 'comma':
      return {
        words: `The probe says ${line}. What is the comma in ${question.number}?`,
        options: [
          { key: 'decimal', words: `A decimal mark: ${question.number.replace(',', '.')}` },
          { key: 'apart', words: 'It parts two numbers' },
        ],
      };
    case 'place':
      return {
        words: `The probe says ${line}. Which number is the exhaust?`,
        options: question.numbers.map((number, i) => ({ key: String(i), words: number })),
      };
  }
}

/** What is known once the question was answered by one of its keys. */
export function withAnswer(
  answers: SerialAnswers,
  question: SerialQuestion,
  key: string,
): SerialAnswers {
  switch (question.about) {
    case 'unit':
      return { ...answers, unit: key === 'C' ? 'C' : 'F' };
    case 'comma':
      return { ...answers, comma: key === 'apart' ? 'apart' : 'decimal' };
    case 'place':
      return { ...answers, place: { at: Number(key), of: question.numbers.length } };
  }
}
