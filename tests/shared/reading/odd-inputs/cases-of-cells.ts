import { log, T, TEMP, type Odd } from './check-odd.ts';

const READ = { t: T, temp: TEMP, unit: 'F' } as const;
const curve = (odd: string) => log('0,70.1', '10,74.5', odd, '30,84.0', '40,88.2', '50,91.1');

/** Odd inputs: cells. */
export const CELL_CASES: Odd[] = [
  {
    row: 8,
    what: 'semicolons with commas in the notes',
    file: 'Elapsed (s);Exhaust °F;Note\n0;70.1;cold, empty\n10;74.5;\n20;80.25;door, shut\n',
    ...READ,
  },
  {
    row: 9,
    what: 'pipes with spaces round them',
    file: 'Elapsed (s) | Exhaust °F\n0 | 70.1\n10 | 74.5\n20 | 80.25\n',
    ...READ,
  },
  {
    row: 9,
    what: 'columns of fixed width without a header',
    file: '    0   70.1F\n   10   74.5F\n   20  80.25F\n',
    ...READ,
  },
  {
    row: 10,
    what: 'sep= before commas in quotes',
    file: 'sep=,\nElapsed (s),Exhaust °F\n0,"70,1"\n10,"74,5"\n20,"80,25"\n',
    ...READ,
  },
  {
    row: 10,
    what: 'sep=| with CR LF',
    file: 'SEP=|\r\nElapsed (s)|Exhaust °F\r\n0|70.1\r\n10|74.5\r\n20|80.25\r\n',
    ...READ,
  },
  {
    row: 11,
    what: 'decimal commas in both columns',
    file: 'Zeit (s);Abluft °C\n0,0;21,1\n0,5;21,5\n1,0;22,25\n',
    t: [0, 0.5, 1],
    temp: [21.1, 21.5, 22.25],
    unit: 'C',
  },
  {
    row: 12,
    what: 'quoted decimal commas in both columns',
    file: '"Elapsed (s)","Exhaust °F"\n"0,0","70,1"\n"10,0","74,5"\n"20,0","80,25"\n',
    ...READ,
  },
  {
    row: 13,
    what: 'unquoted decimal commas with two readings a row',
    file: 'Time,Exhaust °F,Room °F\n2026-05-04 10:00:00,70,1,68,5\n2026-05-04 10:00:10,74,5,68,5\n2026-05-04 10:00:20,80,2,68,6\n',
    refused: { code: 'column-count', row: 2 },
  },
  {
    row: 14,
    what: 'thousands in the sample numbers and a plain reading',
    file: 'No.;Time (s);Exhaust °F\n1.001;0;70,1\n1.002;10;74,5\n1.003;20;80,25\n',
    ...READ,
  },
  {
    row: 15,
    what: '1,234 in a column with points elsewhere groups thousands',
    file: 'Elapsed (s);Exhaust °F\n0;999.5\n10;998.5\n20;1,234\n30;990.5\n40;985.5\n50;984.5\n',
    temp: [999.5, 998.5, 990.5, 985.5, 984.5],
    warns: ['sentinel-excluded'],
  },
  {
    row: 30,
    what: 'a word of the sensor in a cell that has its unit',
    file: 'Elapsed (s),Exhaust\n0,70.1 °F\n10,OPEN\n20,80.25 °F\n30,84 °F\n',
    t: [0, 20, 30],
    aside: [3],
    warns: ['open-sensor'],
  },
  {
    row: 31,
    what: '-9999 at both ends',
    file: log('0,-9999', '10,74.5', '20,80.2', '30,84.0', '40,-9999'),
    t: [0, 10, 20],
    temp: [74.5, 80.2, 84],
    aside: [2, 6],
    warns: ['sentinel-excluded'],
  },
  {
    row: 31,
    what: 'a run of 6553.5 in a curve',
    file: log('0,70.1', '10,6553.5', '20,6553.5', '30,84.0', '40,86.1'),
    temp: [70.1, 84, 86.1],
    aside: [3, 4],
    warns: ['sentinel-excluded'],
  },
  {
    row: 32,
    what: 'words of a spreadsheet',
    file: log('0,70.1', '10,#DIV/0!', '20,#REF!', '30,84.0', '40,86.1'),
    temp: [70.1, 84, 86.1],
    aside: [3, 4],
  },
  {
    row: 33,
    what: 'tabs and spaces for an empty cell',
    file: 'Elapsed (s)\tExhaust °F\n0\t70.1\n10\t  \n20\t80.25\n30\t84\n',
    temp: [70.1, 80.25, 84],
    aside: [3],
  },
  {
    row: 34,
    what: 'digits of Persian and a minus of typesetting',
    file: log('0,−1.5', '10,۷۰.۱', '20,–0.5'),
    temp: [-1.5, 70.1, -0.5],
  },
  {
    row: 35,
    what: 'a bare exponent and a leading plus',
    file: log('0,+7.01e1', '10,7.45E+01', '20,+80.25'),
    ...READ,
  },
  {
    row: 36,
    what: 'a number beyond all doubles in the time',
    file: log('0,70.1', '1e999,74.5', '20,80.25', '30,84'),
    t: [0, 20, 30],
    aside: [3],
  },
  {
    row: 36,
    what: 'an exponent that no reading has is left out',
    file: curve('20,80e3'),
    temp: [70.1, 74.5, 84, 88.2, 91.1],
    warns: ['sentinel-excluded'],
  },
  {
    row: 37,
    what: "the run's own probe dead half-way is a shorter run",
    file: 'Elapsed (s),Exhaust °F,Room °F\n0,70,68\n10,75,68\n20,81,68\n30,OL,68\n40,OL,68\n',
    temp: [70, 75, 81],
    aside: [5, 6],
    warns: ['open-sensor'],
  },
  {
    row: 61,
    what: 'a stuck probe in whole degrees',
    file: log('0,70', '10,70', '20,70', '30,70'),
    warns: ['no-change'],
  },
  {
    row: 62,
    what: 'a cold garage, below nought in °C',
    file: 'Elapsed (s),Exhaust °C\n0,-18.5\n10,-12.1\n20,3.4\n',
    temp: [-18.5, -12.1, 3.4],
    warns: [],
  },
  {
    row: 63,
    what: 'one wild reading is kept, and told',
    file: log(
      ...Array.from(
        { length: 30 },
        (_, i) => `${i * 2},${i === 14 ? '187.3' : (120 + i / 2).toFixed(1)}`,
      ),
    ),
    warns: ['stands-out'],
    aside: [],
  },
  {
    row: 63,
    what: 'a wild first reading is kept, and told',
    file: log(
      ...Array.from(
        { length: 30 },
        (_, i) => `${i * 2},${i === 0 ? '12.0' : (120 + i / 2).toFixed(1)}`,
      ),
    ),
    warns: ['stands-out'],
    aside: [],
  },
  {
    row: 71,
    what: 'script, formula and direction marks in names and notes are text',
    file: 'Elapsed (s),Exhaust °F,"=HYPERLINK(""x"")"\n0,70.1,<script>\n10,74.5,\u202E@x\n20,80.25,=1+1\n',
    ...READ,
  },
  {
    row: 71,
    what: 'a formula for a reading is no reading',
    file: log('0,70.1', '10,=70+4', '20,80.25', '30,84'),
    temp: [70.1, 80.25, 84],
    aside: [3],
  },
];
