import { expect, test } from 'vitest';
import { checkFile, sayBytes } from '#client/pages/upload/check-file.ts';

const MB = 1024 * 1024;

test('a csv or txt of up to 100 MB may be sent, whatever the case of its ending', () => {
  expect(checkFile({ name: 'probe.csv', size: 1 })).toBeNull();
  expect(checkFile({ name: 'PROBE 2.TXT', size: 100 * MB })).toBeNull();
});

test('no file at all is asked for', () => {
  expect(checkFile(undefined)).toBe('Select a probe file');
});

test('a file of another type is named', () => {
  expect(checkFile({ name: 'outlet.xlsx', size: 10 })).toBe(
    'The selected file must be a .csv or .txt. You gave “outlet.xlsx”.',
  );
  expect(checkFile({ name: 'csv', size: 10 })).toContain('must be a .csv or .txt');
});

test('an empty file is said to be empty', () => {
  expect(checkFile({ name: 'a.csv', size: 0 })).toBe(
    'The selected file is empty. You gave “a.csv”.',
  );
});

test('a file over the limit is told both sizes', () => {
  expect(checkFile({ name: 'week.csv', size: 131 * MB })).toBe(
    'The selected file must be 100 MB or smaller. “week.csv” is 131 MB.',
  );
});

test('a file one byte over the limit does not read as 100 MB', () => {
  expect(checkFile({ name: 'week.csv', size: 100 * MB + 1 })).toContain('is 100.1 MB');
});

test('small sizes are said in bytes and kB', () => {
  expect(sayBytes(900)).toBe('900 bytes');
  expect(sayBytes(2048)).toBe('2 kB');
});
