import { log, stamped, T, TEMP, type Odd } from './check-odd.ts';

const READ = { t: T, temp: TEMP } as const;
const at = (hour: number, n: number, day = '2026-05-04') =>
  Array.from({ length: n }, (_, i) => `${day} ${hour}:00:${String(i).padStart(2, '0')}`);
const seconds = (s: number) => new Date(Date.UTC(2026, 4, 4, 10, 0, s)).toISOString().slice(0, 19);

/** Odd inputs: clocks. */
export const CLOCK_CASES: Odd[] = [
  {
    row: 39,
    what: 'an offset of two digits, and a comma before the fraction',
    file: stamped(
      ['2026-05-04T10:00:00,0+02', '2026-05-04T10:00:10,0+02', '2026-05-04T10:00:20,0+02'],
      'Time;Exhaust °F',
    ),
    ...READ,
  },
  {
    row: 40,
    what: 'an order that nothing settles and the times need',
    file: stamped(['01/02/2026 23:59:50', '02/02/2026 00:00:00', '02/02/2026 00:00:10']),
    asks: { about: 'date-order', options: ['day-first', 'month-first'] },
  },
  {
    row: 41,
    what: 'a month in French with an accent, and two digits of the year',
    file: stamped(['05-déc-24 10:00:00', '05-déc-24 10:00:10', '05-déc-24 10:00:20']),
    ...READ,
  },
  {
    row: 41,
    what: 'mars is a month',
    file: stamped(['5 mars 2024 10:00:00', '5 mars 2024 10:00:10', '5 mars 2024 10:00:20']),
    ...READ,
  },
  {
    row: 42,
    what: 'p.m. with points over noon',
    file: stamped(['11:59:50 a.m.', '12:00:00 p.m.', '12:00:10 p.m.']),
    ...READ,
  },
  {
    row: 42,
    what: 'a 12-hour clock without halves, answered to be one of 24',
    file: stamped(['12:59:50', '1:00:00', '1:00:10']),
    answers: { clock: 'm:ss' },
    refused: { code: 'unknown-answer', value: 'm:ss' },
  },
  {
    row: 43,
    what: 'a leap second in a time of day',
    file: stamped(['23:59:50', '23:59:60', '00:00:10']),
    t: [0, 10, 20],
    warns: ['midnight'],
  },
  {
    row: 44,
    what: 'two midnights',
    file: stamped(['20:00:00', '02:00:00', '08:00:00', '14:00:00', '20:00:00', '02:00:00']),
    t: [0, 1, 2, 3, 4, 5].map((n) => n * 21_600),
    warns: ['midnight'],
  },
  {
    row: 45,
    what: 'the time before the date',
    file: 'Clock,Date,Exhaust °F\n23:59:50,05/14/2026,70.1\n00:00:00,05/15/2026,74.5\n00:00:10,05/15/2026,80.25\n',
    ...READ,
  },
  {
    row: 46,
    what: 'days of 1904 give the same seconds as days of 1900',
    file: stamped(['43830.0', '43830.000115741', '43830.000231481']),
    ...READ,
  },
  {
    row: 47,
    what: 'seconds since 1970 in quotes',
    file: stamped(['"1777888800"', '"1777888810"', '"1777888820"']),
    ...READ,
  },
  {
    row: 47,
    what: 'microseconds since 1970',
    file: stamped(['1777888800000000', '1777888810000000', '1777888820000000']),
    ...READ,
  },
  {
    row: 48,
    what: 'minutes past fifty-nine',
    file: stamped(['59:50', '60:00', '60:10'], 'Min:sec,Exhaust °F'),
    ...READ,
  },
  {
    row: 48,
    what: 'a mark lost from h:mm:ss is no other time',
    file: stamped(
      ['0:00:00', '0:00:05', '0:00:10', '0:00.15', '0:00:20', '0:00:25'],
      'Elapsed,Exhaust °F',
    ),
    t: [0, 5, 10, 20, 25],
    aside: [5],
  },
  {
    row: 49,
    what: 'an interval of h:mm:ss above the table',
    file: 'Interval: 0:00:10\nNo,Exhaust °F\n1,70.1\n2,74.5\n3,80.25\n',
    ...READ,
    warns: ['interval-used'],
  },
  {
    row: 50,
    what: 'five-second readings under stamps of a minute',
    file: stamped(Array.from({ length: 36 }, (_, i) => `2026-05-04 10:0${Math.floor(i / 12)}`)),
    t: Array.from({ length: 36 }, (_, i) => 5 * i),
    warns: ['spread-in-stamp'],
  },
  {
    row: 51,
    what: 'one row twice among fine stamps',
    file: stamped([...at(10, 12), '2026-05-04 10:00:11'].map((s) => s)).replace(
      /10:00:11,\d+/g,
      '10:00:11,90',
    ),
    t: Array.from({ length: 12 }, (_, i) => i),
    aside: [14],
    warns: ['duplicates-dropped'],
  },
  {
    row: 52,
    what: 'a logger started again is two runs',
    file: stamped(
      [...at(10, 30), ...at(9, 30)].map((s) => s.slice(11)),
      'Clock,Exhaust °F',
    ),
    asks: { about: 'runs', options: ['1', '2'] },
  },
  {
    row: 53,
    what: 'newest first by a time of day',
    file: stamped(['10:00:20', '10:00:15', '10:00:10', '10:00:05', '10:00:00']),
    t: [0, 5, 10, 15, 20],
    warns: ['reversed'],
  },
  {
    row: 54,
    what: 'clocks go back by half an hour on Lord Howe Island',
    file: stamped([
      '2026-04-05 01:59:50',
      '2026-04-05 01:59:55',
      '2026-04-05 01:30:00',
      '2026-04-05 01:30:05',
    ]),
    t: [0, 5, 10, 15],
    warns: ['clock-change'],
  },
  {
    row: 54,
    what: 'a time of day without a date goes back an hour',
    file: stamped(['1:59:50', '1:59:55', '1:00:00', '1:00:05']),
    t: [0, 5, 10, 15],
    warns: ['clock-change'],
  },
  {
    row: 55,
    what: 'no zone is needed: the same wall clock with and without one',
    file: stamped([
      '2026-05-04 10:00:00 -0700',
      '2026-05-04 10:00:10 -0700',
      '2026-05-04 10:00:20 -0700',
    ]),
    ...READ,
    warns: [],
  },
  {
    row: 55,
    what: 'a zone that changes with summer time keeps the seconds',
    file: stamped([
      '2026-10-25T02:59:50+02:00',
      '2026-10-25T02:00:00+01:00',
      '2026-10-25T02:00:10+01:00',
    ]),
    ...READ,
  },
  {
    row: 56,
    what: 'a clock that woke in 1970 and was set while it ran',
    file: stamped([
      '1970-01-01 00:00:00',
      '1970-01-01 00:00:10',
      '2026-05-04 10:00:00',
      '2026-05-04 10:00:10',
    ]),
    t: [0, 10, 20, 30],
    warns: ['clock-reset'],
  },
  {
    row: 57,
    what: 'a few missing readings of an even record',
    file: log(...[0, 5, 10, 15, 20, 30, 35, 40, 45, 50, 55, 60].map((t) => `${t},${70 + t / 5}`)),
    warns: ['readings-missing'],
  },
  {
    row: 57,
    what: 'an hour missing',
    file: log(...[0, 5, 10, 15, 20, 3625, 3630, 3635].map((t) => `${t},${70 + (t % 60) / 5}`)),
    warns: ['gap'],
  },
  {
    row: 58,
    what: 'events at any time are taken as they come',
    file: log('0,70.1', '3,71', '40,80', '41.5,80.1', '300,120'),
    t: [0, 3, 40, 41.5, 300],
  },
  {
    row: 58,
    what: 'one time off an even step is told, and kept',
    file: stamped(Array.from({ length: 30 }, (_, i) => seconds(i === 9 ? 47 : i * 5))),
    warns: ['uneven-step'],
    aside: [],
  },
];
