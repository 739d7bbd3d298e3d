import { describe, expect, test } from 'vitest';
import {
  inUtf16,
  inWindows1252,
  problemOf,
  readingOf,
  valuesOf,
  warningsOf,
} from '../read-text.ts';

const LOG = 'Elapsed (s),Exhaust °F\n0,70.1\n10,74.5\n20,80.25\n';
const READ = { t: [0, 10, 20], temp: [70.1, 74.5, 80.25] };

describe('encodings', () => {
  test('row 1: UTF-8 with a byte order mark has no mark in its first name', () => {
    const reading = readingOf(`\ufeff${LOG}`);

    expect(reading.timeColumn).toBe('Elapsed (s)');
    expect(reading.encoding).toBe('utf-8');
    expect(valuesOf(`\ufeff${LOG}`)).toEqual(READ);
  });

  test('row 2: UTF-16 with a mark is read in either byte order', () => {
    const text = LOG.replaceAll(',', '\t');

    expect(readingOf(inUtf16(text, 'le', true))).toMatchObject({
      encoding: 'utf-16le',
      channel: 'Exhaust °F',
      channelUnit: 'F',
      delimiter: '\t',
    });
    expect(readingOf(inUtf16(text, 'be', true)).encoding).toBe('utf-16be');
    expect(valuesOf(inUtf16(text, 'le', true))).toEqual(READ);
    expect(valuesOf(inUtf16(text, 'be', true))).toEqual(READ);
  });

  test('row 3: UTF-16 without a mark is known by its zero bytes, and said', () => {
    expect(valuesOf(inUtf16(LOG, 'le', false))).toEqual(READ);
    expect(valuesOf(inUtf16(LOG, 'be', false))).toEqual(READ);
    expect(warningsOf(inUtf16(LOG, 'be', false))).toContain('utf-16-guessed');
  });

  test('row 4: a lone byte 0xB0 is the degree sign of Windows-1252', () => {
    const reading = readingOf(inWindows1252(LOG));

    expect(reading).toMatchObject({
      encoding: 'windows-1252',
      channel: 'Exhaust °F',
      channelUnit: 'F',
    });
    expect(valuesOf(inWindows1252(LOG))).toEqual(READ);
  });

  test('row 5: the degree signs of code page 437 and Mac Roman still give the unit', () => {
    expect(readingOf(inWindows1252(LOG.replace('°F', '\xf8F'))).channelUnit).toBe('F');
    expect(readingOf(inWindows1252(LOG.replace('°F', '\xa1C'))).channelUnit).toBe('C');
  });

  test('row 6: ℃ is °C, also in the bytes of GBK', () => {
    expect(readingOf(LOG.replace('°F', '℃')).channelUnit).toBe('C');
    expect(readingOf(inWindows1252(LOG.replace('°F', '\xa1\xe6'))).channelUnit).toBe('C');
  });

  test('row 7: a byte of another encoding in the middle is refused with its row and place', () => {
    const bytes = new TextEncoder().encode(LOG.replace('74.5', '74.5 x'));
    bytes[bytes.indexOf(120, 30)] = 0xb0;

    expect(problemOf(bytes)).toMatchObject({ code: 'mixed-encoding', row: 3 });
  });
});

describe('line ends', () => {
  test.each([
    ['CR LF', '\r\n'],
    ['CR', '\r'],
    ['CR CR LF', '\r\r\n'],
    ['U+2028', '\u2028'],
  ])('row 65: %s ends a line', (_, end) => {
    expect(valuesOf(LOG.replaceAll('\n', end))).toEqual(READ);
  });

  test('row 65: mixed line ends, two at the end and none at the end are all read', () => {
    expect(valuesOf(LOG.replace('\n', '\r\n'))).toEqual(READ);
    expect(valuesOf(`${LOG}\n`)).toEqual(READ);
    expect(valuesOf(LOG.trimEnd())).toEqual(READ);
  });
});

describe('zero bytes', () => {
  test('row 67: a tail of them is left out and said', () => {
    const bytes = new TextEncoder().encode(`${LOG}\0\0\0\0\0\0`);

    expect(valuesOf(bytes)).toEqual(READ);
    expect(warningsOf(bytes)).toContain('nul-tail');
  });

  test('row 67: among the rows they refuse the file, with the row', () => {
    expect(problemOf(LOG.replace('10,74.5', '10,7\0.5'))).toMatchObject({
      code: 'nul-inside',
      row: 3,
    });
  });
});

describe('files that are no log', () => {
  test.each([
    [
      'spreadsheet-file',
      [0x50, 0x4b, 3, 4, ...new TextEncoder().encode('....[Content_Types].xml')],
    ],
    ['spreadsheet-file', [0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1]],
    ['archive-file', [0x50, 0x4b, 3, 4, 20, 0, 0, 0]],
    ['archive-file', [0x1f, 0x8b, 8, 0]],
    ['pdf-file', [...new TextEncoder().encode('%PDF-1.7\n')]],
    ['picture-file', [0xff, 0xd8, 0xff, 0xe0]],
    ['web-page-file', [...new TextEncoder().encode('<!DOCTYPE html><html></html>')]],
    ['json-file', [...new TextEncoder().encode('{"readings": [1, 2]}')]],
    ['binary-file', Array.from({ length: 400 }, (_, i) => (i * 7) % 31)],
    ['empty-file', []],
    ['empty-file', [10, 13, 32, 10]],
  ])('rows 60, 68, 69: is refused as %s by its first bytes', (code, bytes) => {
    const problem = problemOf(Uint8Array.from(bytes));

    expect(problem.code).toBe(code);
    expect(problem.hint.length).toBeGreaterThan(20);
  });

  test('row 68: words without a number are refused', () => {
    expect(problemOf('Dear customer,\nthe dryer is mended.\n').code).toBe('no-readings');
  });

  test('row 59: a header alone, and one reading, are refused', () => {
    expect(problemOf('Elapsed (s),Exhaust °F\n').code).toBe('no-readings');
    expect(problemOf('Elapsed (s),Exhaust °F\n0,70.1\n')).toMatchObject({
      code: 'too-few-readings',
      message: '1 reading; at least 3 are needed.',
    });
  });

  test('row 70: a line longer than any log has is refused with its row', () => {
    const long = `Elapsed (s),Exhaust °F\n${'x'.repeat(200_000)}\n0,70\n`;

    expect(problemOf(long)).toMatchObject({ code: 'line-too-long', row: 2 });
  });
});
