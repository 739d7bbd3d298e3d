import { describe, expect, test } from 'vitest';
import { problemOf, questionOf, readingOf, readText, valuesOf, warningsOf } from '../read-text.ts';

/** A log of three or more stamps, with readings that rise by one from 70. */
function log(stamps: string[], name = 'Time', delimiter = ';'): string {
  const rows = stamps.map((stamp, i) => `${stamp}${delimiter}${70 + i}.5`);
  return `${[`${name}${delimiter}Exhaust °F`, ...rows].join('\n')}\n`;
}

const timesOf = (text: string, options = {}) => valuesOf(text, options).t;

describe('elapsed clocks', () => {
  test.each([
    ['Elapsed (s)', ['0', '10', '20.5'], [0, 10, 20.5]],
    ['Time [min]', ['0', '0.5', '1.25'], [0, 30, 75]],
    ['t_ms', ['0', '1000', '2500'], [0, 1, 2.5]],
    ['Hours', ['0', '0.01', '0.02'], [0, 36, 72]],
    ['Elapsed', ['0:00', '0:15', '1:30'], [0, 15, 90]],
    ['Elapsed', ['88:50', '89:00', '90:15'], [0, 10, 85]],
    ['mm:ss', ['10:05', '10:10', '10:15'], [0, 5, 10]],
    ['hh:mm', ['10:05', '10:06', '10:08'], [0, 60, 180]],
    ['Elapsed', ['0:00:00', '0:00:10', '1:02:03'], [0, 10, 3723]],
    ['Elapsed', ['00:00:00.0', '00:00:00.2', '00:00:00.7'], [0, 0.2, 0.7]],
    ['Elapsed', ['30:00:00', '30:00:10', '30:00:20'], [0, 10, 20]],
  ])('row 48: %s with %j', (name, stamps, times) => {
    expect(timesOf(log(stamps, name))).toEqual(times);
  });

  test('tenths of seconds come out as tenths', () => {
    const stamps = ['12.1', '12.2', '12.3', '12.4'];

    expect(timesOf(log(stamps, 'Seconds'))).toEqual([0, 0.1, 0.2, 0.3]);
  });

  test('row 48: plain seconds without a unit are said', () => {
    expect(warningsOf(log(['0', '5', '10'], 'Time'))).toContain('clock-assumed');
    expect(timesOf(log(['0', '5', '10'], 'Time'))).toEqual([0, 5, 10]);
  });

  test('row 48: numbers that rise by a sixtieth are asked about, and by a thousand', () => {
    const sixtieths = log(['0', '0.0167', '0.0333', '0.05'], 'Time');

    expect(questionOf(sixtieths)).toMatchObject({
      about: 'clock',
      options: [{ answer: 'minutes' }, { answer: 'seconds' }, { answer: 'hours' }],
    });
    expect(timesOf(sixtieths, { answers: { clock: 'minutes' } })).toEqual([0, 1.002, 1.998, 3]);
    expect(questionOf(log(['0', '1000', '2000'], 'Time')).options[0]?.answer).toBe('milliseconds');
  });

  test('row 48: two parts that may be minutes or hours are asked about, each answer shown', () => {
    const question = questionOf(log(['10:05', '10:10', '10:15'], 'Time'));

    expect(question.about).toBe('clock');
    expect(question.options.map(({ answer, preview }) => [answer, preview[1]?.timeS])).toEqual([
      ['m:ss', 5],
      ['h:mm', 300],
    ]);
  });
});

describe('stamps', () => {
  test.each([
    ['2026-05-04T10:00:00Z', '2026-05-04T10:00:10Z', '2026-05-04T10:01:00Z'],
    ['2026-05-04T10:00:00+02:00', '2026-05-04T10:00:10+02:00', '2026-05-04T10:01:00+02:00'],
    ['2026-05-04T10:00:00+0000', '2026-05-04T10:00:10+0000', '2026-05-04T10:01:00+0000'],
    ['2026-05-04 10:00:00 -0800', '2026-05-04 10:00:10 -0800', '2026-05-04 10:01:00 -0800'],
    ['2026-05-04 10:00:00', '2026-05-04 10:00:10', '2026-05-04 10:01:00'],
    ['2026/05/04 10:00:00', '2026/05/04 10:00:10', '2026/05/04 10:01:00'],
    ['20260504T100000', '20260504T100010', '20260504T100100'],
    ['20260504-100000', '20260504-100010', '20260504-100100'],
    ['20260504100000', '20260504100010', '20260504100100'],
    ['04-May-26 10:00:00', '04-May-26 10:00:10', '04-May-26 10:01:00'],
    ['4 mai 2026 10:00:00', '4 mai 2026 10:00:10', '4 mai 2026 10:01:00'],
    ['May 04 2026 10:00:00', 'May 04 2026 10:00:10', 'May 04 2026 10:01:00'],
    ['May 4, 2026 10:00:00 AM', 'May 4, 2026 10:00:10 AM', 'May 4, 2026 10:01:00 AM'],
    ['Mon 4 May 2026 10:00:00', 'Mon 4 May 2026 10:00:10', 'Mon 4 May 2026 10:01:00'],
    ['14/05/2026 10:00:00', '14/05/2026 10:00:10', '14/05/2026 10:01:00'],
    ['05/14/2026 10:00:00 AM', '05/14/2026 10:00:10 AM', '05/14/2026 10:01:00 AM'],
    ['14.05.26 10:00:00', '14.05.26 10:00:10', '14.05.26 10:01:00'],
    ['1777888800', '1777888810', '1777888860'],
    ['1777888800000', '1777888810000', '1777888860000'],
    ['46146.41666667', '46146.41678241', '46146.41736111'],
  ])('rows 39, 41, 45, 46, 47: %s', (...stamps) => {
    expect(timesOf(log(stamps))).toEqual([0, 10, 60]);
  });

  test('row 39: fractions of a second, with a point or a comma, are kept', () => {
    const stamps = [
      '2026-05-04 10:00:00.250',
      '2026-05-04 10:00:00.500',
      '2026-05-04 10:00:01.125',
    ];

    expect(timesOf(log(stamps))).toEqual([0, 0.25, 0.875]);
    expect(timesOf(log(stamps.map((stamp) => stamp.replace('.', ','))))).toEqual([0, 0.25, 0.875]);
  });

  test('the wall clock of the first reading is told, and none for elapsed times', () => {
    const stamps = [
      '2026-05-04T10:00:00+02:00',
      '2026-05-04T10:00:10+02:00',
      '2026-05-04T10:01:00+02:00',
    ];

    expect(readingOf(log(stamps)).startedAt).toBe('2026-05-04 10:00:00');
    expect(readingOf(log(['0', '1', '2'], 'Seconds')).startedAt).toBeNull();
  });

  test('row 43: a leap second and 24:00:00 are times', () => {
    // RFC 3339 section 5.8 has the leap second; ISO 8601:2004 had the end of a day
    const leap = ['1990-12-31T23:59:59Z', '1990-12-31T23:59:60Z', '1991-01-01T00:00:10Z'];
    const end = ['2026-05-04 23:59:50', '2026-05-04 24:00:00', '2026-05-05 00:00:10'];

    expect(timesOf(log(leap))).toEqual([0, 1, 11]);
    expect(timesOf(log(end))).toEqual([0, 10, 20]);
  });

  test('row 39: a day that no calendar has is set aside', () => {
    const stamps = [
      '2024-02-28 10:00:00',
      '2024-02-30 10:00:10',
      '2024-02-28 10:00:20',
      '2024-02-28 10:00:30',
    ];

    expect(readingOf(log(stamps)).skippedRows).toEqual([
      { row: 3, why: 'not a time: 2024-02-30 10:00:10' },
    ]);
  });

  test('row 45: date and time in two columns are one clock', () => {
    const text =
      'Date,Time,Exhaust °F\n05/14/2026,11:59:50 PM,70\n05/14/2026,11:59:55 PM,71\n05/15/2026,12:00:05 AM,72\n';

    expect(timesOf(text)).toEqual([0, 5, 15]);
    expect(readingOf(text)).toMatchObject({
      timeColumn: 'Date, Time',
      startedAt: '2026-05-14 23:59:50',
    });
  });

  test('one of two stamps is taken, and the other kept by name', () => {
    const text =
      'id,value °F,created_at,updated_at\n1,70,2026-05-04 10:00:00,2026-05-04 10:00:00\n2,71,2026-05-04 10:00:10,2026-05-04 10:00:10\n3,72,2026-05-04 10:00:20,2026-05-04 10:00:20\n';

    expect(readingOf(text).timeColumn).toBe('created_at');
    expect(timesOf(text)).toEqual([0, 10, 20]);
  });
});

describe('day and month', () => {
  test('row 40: one day after the twelfth settles the order for the whole file', () => {
    const dayFirst = ['03/05/2026 10:00:00', '04/05/2026 10:00:00', '13/05/2026 10:00:00'];
    const monthFirst = ['05/03/2026 10:00:00', '05/04/2026 10:00:00', '05/13/2026 10:00:00'];

    expect(timesOf(log(dayFirst))).toEqual([0, 86_400, 864_000]);
    expect(timesOf(log(monthFirst))).toEqual([0, 86_400, 864_000]);
    expect(readingOf(log(dayFirst)).clock).toBe('day first');
  });

  test('row 40: an order that changes nothing is not asked about, but said', () => {
    const text = log(['04/05/2026 10:00:00', '04/05/2026 10:00:10', '04/05/2026 10:00:20']);

    expect(timesOf(text)).toEqual([0, 10, 20]);
    expect(warningsOf(text)).toContain('date-order-not-needed');
  });

  test('row 40: an order that changes the times is asked about, the likelier first', () => {
    const text = log(['04/05/2026 23:59:50', '05/05/2026 00:00:00', '05/05/2026 00:00:10']);
    const question = questionOf(text);

    expect(question.about).toBe('date-order');
    expect(question.options.map(({ answer }) => answer)).toEqual(['day-first', 'month-first']);
    expect(question.options[0]?.preview[1]).toMatchObject({ row: 3, timeS: 10, temp: 71.5 });
    expect(timesOf(text, { answers: { 'date-order': 'day-first' } })).toEqual([0, 10, 20]);
    expect(timesOf(text, { answers: { 'date-order': 'month-first' } })[1]).toBe(29 * 86_400 + 10);
  });
});

describe('midnight and settings of the clock', () => {
  test('row 44: a time of day runs on past midnight', () => {
    const text = log(['23:59:50', '23:59:55', '00:00:05']);

    expect(timesOf(text)).toEqual([0, 5, 15]);
    expect(readingOf(text).warnings).toContainEqual({
      code: 'midnight',
      row: 4,
      message: 'The clock passes midnight in row 4.',
    });
  });

  test('row 42: a 12-hour clock is read by its AM and PM', () => {
    expect(timesOf(log(['12:59:50 PM', '1:00:00 PM', '1:00:10 p.m.']))).toEqual([0, 10, 20]);
    expect(timesOf(log(['11:59:50 PM', '12:00:00 AM', '12:00:10 AM']))).toEqual([0, 10, 20]);
  });

  test('row 42: a 12-hour clock that lost them is asked about', () => {
    const text = log(['12:59:50', '1:00:00', '1:00:10']);

    expect(questionOf(text)).toMatchObject({
      about: 'clock',
      options: [{ answer: '12-hour' }, {}],
    });
    expect(timesOf(text, { answers: { clock: '12-hour' } })).toEqual([0, 10, 20]);
  });

  test('row 54: the end of summer time adds no hour', () => {
    const stamps = [
      '2026-10-25 02:59:40',
      '2026-10-25 02:59:50',
      '2026-10-25 02:00:00',
      '2026-10-25 02:00:10',
    ];

    expect(timesOf(log(stamps))).toEqual([0, 10, 20, 30]);
    expect(warningsOf(log(stamps))).toContain('clock-change');
  });

  test('row 54: nor does its beginning, while a pause of an hour on a weekday is a pause', () => {
    const spring = [
      '2026-03-29 01:59:40',
      '2026-03-29 01:59:50',
      '2026-03-29 03:00:00',
      '2026-03-29 03:00:10',
    ];

    expect(timesOf(log(spring))).toEqual([0, 10, 20, 30]);
    expect(timesOf(log(spring.map((s) => s.replace('03-29', '03-30'))))).toEqual([
      0, 10, 3620, 3630,
    ]);
  });

  test('row 56: a clock that falls back to the year 2000 runs on from the row before', () => {
    const stamps = [
      '2026-05-04 10:00:00',
      '2026-05-04 10:00:10',
      '2000-01-01 00:00:00',
      '2000-01-01 00:00:10',
    ];

    expect(timesOf(log(stamps))).toEqual([0, 10, 20, 30]);
    expect(warningsOf(log(stamps))).toContain('clock-reset');
  });
});

describe('no clock', () => {
  test('row 49: a sample number counts by the interval above the table', () => {
    const text = 'Logger 7\nSample rate: 5 s\n\nNo.,Exhaust °F\n1,70\n2,71\n4,72\n';

    expect(timesOf(text)).toEqual([0, 5, 15]);
    expect(warningsOf(text)).toContain('interval-used');
  });

  test('row 49: without an interval it is asked', () => {
    const text = 'No.,Exhaust °F\n1,70\n2,71\n3,72\n';

    expect(questionOf(text).about).toBe('interval');
    expect(timesOf(text, { answers: { interval: '2' } })).toEqual([0, 2, 4]);
  });

  test('row 49: a column of readings alone is asked about too', () => {
    const text = 'Exhaust °F\n70.5\n71.5\n72\n';

    expect(questionOf(text).about).toBe('interval');
    expect(valuesOf(text, { answers: { interval: '0.5' } })).toEqual({
      t: [0, 0.5, 1],
      temp: [70.5, 71.5, 72],
    });
  });

  test('a column of words for a time is refused', () => {
    expect(readText('When,Exhaust °F\nsoon,70\nlater,71\nlast,72\n').kind).not.toBe('read');
    expect(problemOf('Time,Note\n0,a\n1,b\n2,c\n').code).toBe('no-temperature');
  });
});
