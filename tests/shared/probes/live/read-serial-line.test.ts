import fc from 'fast-check';
import { expect, test } from 'vitest';
import {
  NOTHING_SAID,
  readSerialLine,
  type SerialAnswers,
} from '#shared/probes/live/read-serial-line.ts';

const read = (line: string, said: Partial<SerialAnswers> = {}) =>
  readSerialLine(line, { ...NOTHING_SAID, ...said });
const value = (temp: number, unit: 'F' | 'C') => ({ is: 'value', value: { temp, unit } });

test.each([
  ['154.2 F', 154.2, 'F'],
  ['154.2F', 154.2, 'F'],
  ['68.25°C', 68.25, 'C'],
  ['68.25 deg C', 68.25, 'C'],
  ['T1=154.2 F', 154.2, 'F'],
  ['Temp (C): 68.25', 68.25, 'C'],
  ['  +68.25\u00A0°C  ', 68.25, 'C'],
  ['-10.5 C', -10.5, 'C'],
  ['−10.5 C', -10.5, 'C'],
  ['1.542e2 F', 154.2, 'F'],
  ['154 Fahrenheit', 154, 'F'],
  // A degree sign of another encoding, as it comes out of a decoder for UTF-8.
  ['68.25\uFFFDC', 68.25, 'C'],
] as const)('"%s" needs no question', (line, temp, unit) => {
  expect(read(line)).toEqual(value(temp, unit));
});

test('a number without a unit is asked about, and then read as it was said', () => {
  expect(read('154.2')).toEqual({
    is: 'question',
    question: { about: 'unit', line: '154.2', number: '154.2' },
  });
  expect(read('154.2', { unit: 'F' })).toEqual(value(154.2, 'F'));
  expect(read('68.25 C', { unit: 'F' })).toEqual(value(68.25, 'C'));
});

test('a comma is asked about: it may be a decimal mark or part two numbers', () => {
  expect(read('68,25 C')).toMatchObject({ question: { about: 'comma', number: '68,25' } });
  expect(read('68,25 C', { comma: 'decimal' })).toEqual(value(68.25, 'C'));
  expect(read('22,154', { comma: 'apart', unit: 'F' })).toMatchObject({
    question: { about: 'place', numbers: ['22', '154'] },
  });
  expect(read('21.5,154.2', { unit: 'F' })).toMatchObject({
    question: { about: 'place', numbers: ['21.5', '154.2'] },
  });
});

test('of two numbers none is guessed; the one that was said is read in every like line', () => {
  const line = 'box 21.5 F exhaust 154.2 F';

  expect(read(line)).toMatchObject({ question: { about: 'place', numbers: ['21.5', '154.2'] } });
  expect(read(line, { place: { at: 1, of: 2 } })).toEqual(value(154.2, 'F'));
  expect(read('154.2 F', { place: { at: 1, of: 2 } })).toEqual({ is: 'unread' });
  expect(read('1 2 3', { place: { at: 1, of: 2 }, unit: 'F' })).toEqual({ is: 'unread' });
});

test.each([
  '',
  'ready',
  'T1 OK',
  'ERR_7',
  'open thermocouple',
  'v1.2.3',
  '0x1F',
  '55 %',
  '1013 hPa',
  '900ms',
  '341.4 K',
])('"%s" holds no temperature, whatever was said', (line) => {
  expect(read(line, { unit: 'F', comma: 'decimal' })).toEqual({ is: 'unread' });
});

test('an impossible temperature is no reading', () => {
  expect(read('4999 F')).toEqual({ is: 'value', value: { none: 'implausible' } });
  expect(read('-127.00 C')).toEqual({ is: 'value', value: { none: 'implausible' } });
});

test('any line of text is read, asked about or left unread, and never made up', () => {
  fc.assert(
    fc.property(fc.string({ unit: 'binary', maxLength: 80 }), (line) => {
      const answer = read(line, { unit: 'F', comma: 'decimal' });
      const figures = line.replaceAll(/\D/g, '');
      if (answer.is === 'value' && 'temp' in answer.value) expect(figures).not.toBe('');
      expect(['value', 'question', 'unread']).toContain(answer.is);
    }),
  );
});
