import { test } from 'vitest';
import { checkOdd, log, T, TEMP, type Odd } from './check-odd.ts';

const ROWS = '0,70.1\n10,74.5\n20,80.25\n';
const READ = { t: T, temp: TEMP, unit: 'F' } as const;
const even = (n: number, row: (i: number) => string) => Array.from({ length: n }, (_, i) => row(i));

const CASES: Odd[] = [
  {
    row: 16,
    what: 'a preamble of numbers and dates',
    file: `Serial,004512,7\nFrom,2026-05-04,10:00:00\nAlarm low,32\nAlarm high,200\n\nElapsed (s),Exhaust °F\n${ROWS}`,
    ...READ,
  },
  {
    row: 17,
    what: 'blank lines between preamble, header and readings',
    file: `Logger 7\n\n\nElapsed (s),Exhaust °F\n\n${ROWS}`,
    ...READ,
  },
  {
    row: 17,
    what: 'lines of empty cells between them',
    file: `Logger 7,\n,\nElapsed (s),Exhaust °F\n,\n${ROWS}`,
    ...READ,
  },
  {
    row: 18,
    what: 'an average that looks like a reading is never a sample',
    file: `Elapsed (s),Exhaust °F\n${ROWS}30,84\n40,87\nAvg,74.9\nMin,70.1\nMax,80.25\n***,END\n`,
    temp: [...TEMP, 84, 87],
    aside: [7, 8, 9, 10],
  },
  {
    row: 18,
    what: 'a footer of one number',
    file: `Elapsed (s),Exhaust °F\n${ROWS}\n3\n`,
    ...READ,
    aside: [6],
  },
  {
    row: 19,
    what: 'the header on every page',
    file: `Elapsed (s),Exhaust °F\n0,70.1\nElapsed (s),Exhaust °F\n10,74.5\nElapsed (s),Exhaust °F\n20,80.25\n`,
    ...READ,
    aside: [3, 5],
    warns: ['header-repeated'],
  },
  {
    row: 20,
    what: 'no header and no unit',
    file: ROWS,
    asks: { about: 'unit', options: ['F', 'C'] },
  },
  {
    row: 20,
    what: 'no header, two columns that swing alike',
    file: even(40, (i) => `${i},${150 - (i % 20)}.5,${100 + (i % 20)}.5`).join('\n') + '\n',
    asks: { about: 'channel', options: ['Column 2', 'Column 3'] },
  },
  {
    row: 21,
    what: 'a name, a place and a unit, one below the other',
    file: `Time,Probe 1\n,Exhaust\ns,°F\n${ROWS}`,
    ...READ,
  },
  {
    row: 21,
    what: 'titles of two lines in quotes',
    file: `"Elapsed\n(s)","Exhaust\n°F"\n${ROWS}`,
    ...READ,
  },
  {
    row: 22,
    what: 'two columns of one name that differ are asked about by number',
    file: `Elapsed (s),Temp °F,Temp °F\n${even(40, (i) => `${i},${150 - (i % 20)}.5,${100 + (i % 20)}.5`).join('\n')}\n`,
    asks: { about: 'channel', options: ['Temp °F', 'Temp °F (2)'] },
  },
  {
    row: 23,
    what: 'an empty first header cell over the times',
    file: `,Exhaust °F\n2026-05-04 10:00:00,70.1\n2026-05-04 10:00:10,74.5\n2026-05-04 10:00:20,80.25\n`,
    ...READ,
  },
  {
    row: 24,
    what: 'a unit in brackets of every kind',
    file: `Elapsed (s),Vent temp {f}\n${ROWS}`,
    ...READ,
  },
  {
    row: 25,
    what: 'units in cells with a decimal comma',
    file: 'Elapsed (s);Exhaust\n0;21,2 °C\n10;22,4 °C\n20;24,1 °C\n',
    temp: [21.2, 22.4, 24.1],
    unit: 'C',
  },
  {
    row: 26,
    what: 'one cell that states another unit than the header does',
    file: 'Elapsed (s),Exhaust °F\n0,68\n10,70\n20,25 °C\n30,80\n40,84\n',
    temp: [68, 70, 77, 80, 84],
    warns: ['units-converted'],
  },
  {
    row: 27,
    what: 'the same probe twice, in °C first',
    file: 'Elapsed (s),Exhaust °C,Exhaust °F\n0,20,68\n10,25,77\n20,30,86\n',
    t: T,
    temp: [20, 25, 30],
    unit: 'C',
  },
  {
    row: 28,
    what: 'no unit: kelvin is offered where nothing lies under 250',
    file: 'Elapsed (s),Exhaust\n0,293.1\n10,320.2\n20,340.4\n',
    asks: { about: 'unit', options: ['K', 'F', 'C'] },
  },
  {
    row: 28,
    what: 'no unit, answered',
    file: 'Elapsed (s),Exhaust\n0,70.1\n10,74.5\n20,80.25\n',
    answers: { unit: 'F' },
    ...READ,
  },
  {
    row: 29,
    what: 'thousandths of a degree',
    file: 'Elapsed (s),Exhaust °C\n0,21100\n10,54500\n20,68200\n',
    asks: { about: 'scale', options: ['thousandths'] },
  },
  {
    row: 29,
    what: 'counts of a converter',
    file: 'Elapsed (s),Exhaust °F\n0,0x1A2\n10,0x1B0\n20,0x1C4\n',
    refused: { code: 'no-temperature' },
  },
  {
    row: 38,
    what: 'battery, humidity and dew point beside the exhaust',
    file: `Elapsed (s),RH,Dew point °F,Battery V,Exhaust °F\n0,40,45,3.6,70.1\n10,41,45,3.6,74.5\n20,41,46,3.6,80.25\n`,
    ...READ,
  },
  {
    row: 64,
    what: 'a quote that is never closed costs its own row',
    file: log('0,70.1', '10,"74.5', '20,80.25', '30,84.1', '40,87.2'),
    t: [0, 20, 30, 40],
    aside: [3],
    warns: ['rows-set-aside'],
  },
  {
    row: 64,
    what: 'a note of several lines belongs to its row (RFC 4180 section 2 rule 6)',
    file: 'Elapsed (s),Exhaust °F,Note\n0,70.1,"door open,\nthen shut\n(twice)"\n10,74.5,\n20,80.25,"said ""warm"""\n',
    ...READ,
    aside: [],
    warns: [],
  },
  {
    row: 64,
    what: 'a stray quote before rows with quotes swallows none of them',
    file: 'Elapsed (s),Exhaust °F,Note\n0,70.1,"cold\n10,74.5,\n20,80.25,"warm"\n30,84.1,\n40,87.2,\n',
    t: [10, 20, 30, 40].map((t) => t - 10),
    aside: [2],
  },
  {
    row: 64,
    what: 'one cell too many, though empty',
    file: 'Elapsed (s),Exhaust °F,Note\n0,70.1,\n10,7,4.5,\n20,80.25,\n30,84.1,\n40,87.2,\n',
    t: [0, 20, 30, 40],
    aside: [3],
  },
  {
    row: 64,
    what: 'a delimiter lost between two readings',
    file: 'Elapsed (s),Exhaust °F,Room °F,Note\n0,70,68,a\n10,7468,b\n20,80,68,c\n30,84,68,d\n40,87,68,e\n',
    t: [0, 20, 30, 40],
    aside: [3],
  },
  {
    row: 72,
    what: 'columns that change places',
    file: 'Elapsed (s),Exhaust °F,Room °F\n0,70,68\n10,75,68\n20,81,68\nElapsed (s),Room °F,Exhaust °F\n30,68,86\n',
    refused: { code: 'columns-change', row: 5 },
  },
  {
    row: 72,
    what: 'a second table with more columns',
    file: 'Elapsed (s),Exhaust °F\n0,70\n10,75\n20,81\n\nTime,Vent temp °F,Humidity\n0,70,40\n',
    refused: { code: 'columns-change', row: 6 },
  },
];

test.each(CASES)('row $row: $what', checkOdd);
