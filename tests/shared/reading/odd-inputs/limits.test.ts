import { expect, test } from 'vitest';
import { problemOf, readText } from '../read-text.ts';
import { log } from './check-odd.ts';

const LOG = log('0,70.1', '10,74.5', '20,80.25');

test('row 70: a thousand and one columns are refused with the limit', () => {
  const wide = `${Array.from({ length: 1002 }, (_, i) => `c${i}`).join(',')}\n`;

  expect(problemOf(wide)).toMatchObject({ code: 'too-many-columns', row: 1 });
});

test('row 70: one line of 50 MB is refused in two seconds of processor time', () => {
  const line = new Uint8Array(50_000_000).fill(55);
  const before = process.cpuUsage();

  expect(problemOf(line)).toMatchObject({ code: 'line-too-long', row: 1 });
  expect(process.cpuUsage(before).user / 1e6).toBeLessThan(2);
});

test('row 70: a million empty lines before the readings end early, by name', () => {
  const outcome = readText(`${'\n'.repeat(1_000_000)}${LOG}`);

  expect(outcome).toMatchObject({ kind: 'refused', problem: { code: 'no-readings' } });
});

test('row 70: a hundred thousand quotes cost no more than their length', () => {
  const before = process.cpuUsage();
  const outcome = readText(log('0,70.1', `10,${'"'.repeat(99_000)}`, '20,80.25', '30,84', '40,87'));

  expect(outcome.kind).toBe('read');
  expect(process.cpuUsage(before).user / 1e6).toBeLessThan(2);
});
