import { inUtf16, inWindows1252 } from '../read-text.ts';
import { HEADER, log, T, TEMP, type Odd } from './check-odd.ts';

const LOG = log('0,70.1', '10,74.5', '20,80.25');
const READ = { t: T, temp: TEMP, unit: 'F' } as const;
const bytes = (text: string) => new TextEncoder().encode(text);

/** Odd inputs: text. */
export const TEXT_CASES: Odd[] = [
  {
    row: 1,
    what: 'a mark before a quoted header',
    file: `\ufeff"Elapsed (s)","Exhaust °F"\n0,70.1\n10,74.5\n20,80.25\n`,
    ...READ,
  },
  { row: 1, what: 'a mark before a preamble', file: `\ufeffLogger 7\n\n${LOG}`, ...READ },
  {
    row: 2,
    what: 'UTF-16, high octet first, with a mark and CR LF',
    file: inUtf16(LOG.replaceAll('\n', '\r\n').replaceAll(',', '\t'), 'be', true),
    ...READ,
  },
  {
    row: 2,
    what: 'UTF-16 that lost its last octet',
    file: inUtf16(LOG, 'le', true).subarray(0, -1),
    t: T,
    temp: TEMP,
  },
  {
    row: 3,
    what: 'UTF-16 without a mark and without a header',
    file: inUtf16('0\t70.1 °F\n10\t74.5 °F\n20\t80.25 °F\n', 'le', false),
    ...READ,
    warns: ['utf-16-guessed'],
  },
  {
    row: 4,
    what: 'the degree sign of Windows-1252 in every cell',
    file: inWindows1252('Elapsed (s),Exhaust\n0,70.1 °F\n10,74.5 °F\n20,80.25 °F\n'),
    ...READ,
  },
  {
    row: 4,
    what: 'the degree sign of Windows-1252 in a unit row',
    file: inWindows1252('Elapsed;Exhaust\ns;°F\n0;70,1\n10;74,5\n20;80,25\n'),
    ...READ,
  },
  {
    row: 5,
    what: 'the degree sign of code page 437 in every cell',
    file: inWindows1252('Elapsed (s),Exhaust\n0,21.1 øC\n10,23.5 øC\n20,26.5 øC\n'),
    t: T,
    temp: [21.1, 23.5, 26.5],
    unit: 'C',
  },
  {
    row: 6,
    what: '℉ in a header and ℃ in cells',
    file: 'Elapsed (s),Exhaust ℉\n0,70.1\n10,74.5\n20,80.25\n',
    ...READ,
  },
  {
    row: 6,
    what: '℃ in the bytes of Shift-JIS',
    file: inWindows1252('Elapsed (s),Exhaust \x81\x8e\n0,21.1\n10,23.5\n20,26.5\n'),
    unit: 'C',
    temp: [21.1, 23.5, 26.5],
  },
  {
    row: 7,
    what: 'a degree sign of Windows-1252 joined to a file in UTF-8',
    file: Uint8Array.from([...bytes(LOG), ...inWindows1252('30,85 °F\n')]),
    refused: { code: 'mixed-encoding', row: 5 },
  },
  {
    row: 59,
    what: 'one row without a header',
    file: '0,70.1 °F\n',
    refused: { code: 'too-few-readings' },
  },
  {
    row: 59,
    what: 'two readings',
    file: log('0,70.1', '10,74.5'),
    refused: { code: 'too-few-readings', message: '2 readings; at least 3 are needed.' },
  },
  {
    row: 60,
    what: 'a byte order mark and nothing else',
    file: Uint8Array.of(0xef, 0xbb, 0xbf),
    refused: { code: 'empty-file' },
  },
  { row: 60, what: 'blank lines only', file: '\r\n\r\n  \t\r\n', refused: { code: 'empty-file' } },
  {
    row: 65,
    what: 'CR LF with a lone CR and a lone LF among them',
    file: `${HEADER}\r\n0,70.1\r10,74.5\n20,80.25\r\n`,
    ...READ,
  },
  { row: 65, what: 'U+2028 beside a degree sign', file: LOG.replaceAll('\n', '\u2028'), ...READ },
  {
    row: 66,
    what: 'a last line cut after its stamp',
    file: log('0,70.1', '10,74.5', '20,80.2', '30,84.0', '40,87.3').concat('50,'),
    t: [0, 10, 20, 30, 40],
    warns: ['truncated-line'],
    aside: [7],
  },
  {
    row: 66,
    what: 'a last line cut in its last digits',
    file: log('0,70.10', '10,74.50', '20,80.25', '30,84.01', '40,87.33').concat('50,90.2'),
    t: [0, 10, 20, 30, 40],
    warns: ['truncated-line'],
    aside: [7],
  },
  {
    row: 66,
    what: 'whole degrees without a last line end: nobody can know',
    file: log('0,70', '10,74', '20,80', '30,84', '40,87').concat('50,9'),
    warns: ['no-last-line-end'],
  },
  {
    row: 67,
    what: 'a tail of zeros in the middle of a row',
    file: log('0,70.1', '10,74.5', '20,80.2', '30,84.0', '40,87.3').concat('50,9\0\0\0\0'),
    t: [0, 10, 20, 30, 40],
    warns: ['nul-tail', 'truncated-line'],
  },
  {
    row: 67,
    what: 'a sector of zeros among the rows',
    file: log('0,70.1', '10,74.5', `20,${'\0'.repeat(512)}`, '30,84.0'),
    refused: { code: 'nul-inside', row: 4 },
  },
  {
    row: 68,
    what: 'a web page with a table of readings',
    file: '  <table><tr><td>0</td><td>70.1</td></tr></table>',
    refused: { code: 'web-page-file' },
  },
  {
    row: 68,
    what: 'readings as JSON',
    file: '[{"t":0,"f":70.1},{"t":10,"f":74.5}]',
    refused: { code: 'json-file' },
  },
  {
    row: 68,
    what: 'a workbook of the open kind',
    file: Uint8Array.from([
      0x50,
      0x4b,
      3,
      4,
      ...bytes('....mimetypeapplication/vnd.oasis.opendocument.spreadsheet'),
    ]),
    refused: { code: 'spreadsheet-file' },
  },
  {
    row: 69,
    what: 'a packed file is named and never opened',
    file: Uint8Array.from([0x1f, 0x8b, 8, 0, ...new Uint8Array(200).fill(7)]),
    refused: { code: 'archive-file' },
  },
  {
    row: 69,
    what: 'a zip of a log',
    file: Uint8Array.from([0x50, 0x4b, 3, 4, 20, 0, ...bytes('run.csv'), ...new Uint8Array(64)]),
    refused: { code: 'archive-file' },
  },
];
