import { expect, test } from 'vitest';
import { readText } from '../read-text.ts';
import { checkOdd } from './check-odd.ts';
import { EVERY_CASE } from './every-case.ts';

test.each(EVERY_CASE)('row $row: $what', checkOdd);

test('whatever was looked at is what is taken: the same octets give the same outcome again', () => {
  for (const { file, answers = {} } of EVERY_CASE) {
    expect(readText(file, { answers })).toEqual(readText(file, { answers }));
  }
});
