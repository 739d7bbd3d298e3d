import { describe, expect, test } from 'vitest';
import { problemOf, questionOf, readingOf, valuesOf, warningsOf } from '../read-text.ts';

const ROWS = '0,70.1\n10,74.5\n20,80.25\n';
const READ = { t: [0, 10, 20], temp: [70.1, 74.5, 80.25] };

describe('what stands above the readings', () => {
  test('rows 16, 17: a preamble with commas, serials, notes and blank lines is passed', () => {
    const text = `Harrow Lane logger,type 7\nSerial,004512\nStarted,2026-05-04 10:00:00\n"Note, by hand",ok\n\nElapsed (s),Exhaust °F\n${ROWS}`;

    expect(valuesOf(text)).toEqual(READ);
    expect(readingOf(text).preview[0]).toEqual({
      row: 7,
      cells: ['0', '70.1'],
      timeS: 0,
      temp: 70.1,
    });
  });

  test('row 16: sixty lines of it are passed too', () => {
    const lines = Array.from({ length: 60 }, (_, i) => `Setting ${i},${i}`).join('\n');

    expect(valuesOf(`${lines}\nElapsed (s),Exhaust °F\n${ROWS}`)).toEqual(READ);
  });

  test('row 21: a row of units under the header gives the units', () => {
    const reading = readingOf(`Elapsed,Exhaust\ns,°C\n${ROWS}`);

    expect(reading).toMatchObject({ channel: 'Exhaust', channelUnit: 'C', timeColumn: 'Elapsed' });
    expect(reading.columns[1]).toMatchObject({ unit: 'C', unitFrom: 'unit row' });
  });

  test.each([
    ['Temp(°F)', 'F'],
    ['Temp [C]', 'C'],
    ['Temperature degF', 'F'],
    ['Temp Deg. C', 'C'],
    ['Exhaust (Fahrenheit)', 'F'],
    ['exhaust_f', 'F'],
    ['TempC', 'C'],
    ['Temp/°C', 'C'],
    ['Temp (K)', 'K'],
    ['Exhaust ºF', 'F'],
  ] as const)('row 24: %s says its unit', (name, unit) => {
    const warm = unit === 'K' ? '0,293.1\n10,295\n20,299\n' : ROWS;

    expect(readingOf(`Elapsed (s),${name}\n${warm}`).channelUnit).toBe(unit);
  });

  test('row 24: a letter that is a label is no unit', () => {
    expect(questionOf(`Elapsed (s),Sensor C\n${ROWS}`).about).toBe('unit');
    expect(questionOf(`Elapsed (s),Thermocouple K\n${ROWS}`).about).toBe('unit');
  });

  test.each(['Units: F', 'Temperature unit;Celsius', 'Unit,°C'])(
    'row 24: "%s" above the table does',
    (line) => {
      const reading = readingOf(`${line}\n\nElapsed (s),Exhaust\n${ROWS}`);

      expect(reading.channelUnit).toBe(line.endsWith('F') ? 'F' : 'C');
      expect(reading.columns[1]?.unitFrom).toBe('preamble');
    },
  );

  test.each([
    ['70.1 °F', '74.5 °F', '80.25 °F', 'F'],
    ['70.1F', '74.5F', '80.25F', 'F'],
    ['70.1 C', '74.5 C', '80.25 C', 'C'],
  ])('row 25: %s says the unit in the cell', (a, b, c, unit) => {
    const text = `Elapsed (s),Exhaust\n0,${a}\n10,${b}\n20,${c}\n`;

    expect(valuesOf(text)).toEqual(READ);
    expect(readingOf(text).channelUnit).toBe(unit);
    expect(readingOf(text).columns[1]?.unitFrom).toBe('cells');
  });

  test('row 26: readings in another unit, each saying its own, are converted', () => {
    const text = 'Elapsed (s),Exhaust\n0,68 °F\n10,70 °F\n20,25 °C\n30,30 °C\n';

    expect(valuesOf(text).temp).toEqual([68, 70, 77, 86]);
    expect(warningsOf(text)).toContain('units-converted');
  });

  test('row 26: a unit that changes without every cell saying so is refused at its row', () => {
    const text = 'Elapsed (s),Exhaust\n0,68 °F\n10,70 °F\n20,25 °C\n30,30\n40,31\n';

    expect(problemOf(text)).toMatchObject({ code: 'mixed-units', row: 4 });
  });

  test('row 28: no unit anywhere is asked about, the likeliest first', () => {
    const dryer = 'Elapsed (s),Exhaust\n0,70.1\n10,120.5\n20,154.2\n';
    const celsius = 'Elapsed (s),Exhaust\n0,21.1\n10,54.5\n20,68.2\n';
    const kelvin = 'Elapsed (s),Exhaust\n0,293.1\n10,320\n20,340.2\n';
    const answersOf = (text: string) => questionOf(text).options.map(({ answer }) => answer);

    expect(answersOf(dryer)).toEqual(['F', 'C']);
    expect(answersOf(celsius)).toEqual(['C', 'F']);
    expect(answersOf(kelvin)).toEqual(['K', 'F', 'C']);
    expect(readingOf(dryer, { answers: { unit: 'F' } })).toMatchObject({
      channelUnit: 'F',
      columns: [{}, { unit: 'F', unitFrom: 'answered' }],
    });
  });

  test('row 29: kelvin and Fahrenheit become °C in the series and stay as recorded beside it', () => {
    // NIST SP 811 (2008) B.8: 98.6 °F is 37 °C; T/K = t/°C + 273.15
    const fahrenheit = readingOf('Elapsed (s),Exhaust °F\n0,98.6\n1,212\n2,32\n');
    const kelvin = readingOf('Elapsed (s),Exhaust K\n0,310.15\n1,373.15\n2,273.15\n');

    for (const { series } of [fahrenheit, kelvin]) {
      expect(series.tempsC[0]).toBeCloseTo(37, 12);
      expect(series.tempsC[1]).toBeCloseTo(100, 12);
      expect(series.tempsC[2]).toBeCloseTo(0, 12);
    }
    expect(Array.from(fahrenheit.temps)).toEqual([98.6, 212, 32]);
  });

  test('row 29: tenths of a degree are asked about', () => {
    const text = 'Elapsed (s),Exhaust °F\n0,701\n10,1205\n20,1542\n';

    expect(questionOf(text)).toMatchObject({
      about: 'scale',
      options: [{ answer: 'tenths' }, {}, {}],
    });
    expect(valuesOf(text, { answers: { scale: 'tenths' } }).temp).toEqual([70.1, 120.5, 154.2]);
  });

  test('row 29: raw counts are refused at their row', () => {
    const text = 'Elapsed (s),Exhaust °F\n0,20123.5\n10,20456.5\n20,21999.5\n';

    expect(problemOf(text)).toMatchObject({ code: 'out-of-range', row: 2, column: 'Exhaust °F' });
  });
});

describe('columns', () => {
  test('row 20: no header is read by type, with made names', () => {
    const text = `0,70.1 °F\n10,74.5 °F\n20,80.25 °F\n`;

    expect(valuesOf(text)).toEqual(READ);
    expect(readingOf(text)).toMatchObject({ timeColumn: 'Column 1', channel: 'Column 2' });
  });

  test('row 22: two probes of one name are two columns', () => {
    const text = 'Elapsed (s),Temp °F,Temp °F\n0,70,60\n10,120,60.5\n20,154,61\n';

    expect(readingOf(text).columns.map(({ name }) => name)).toEqual([
      'Elapsed (s)',
      'Temp °F',
      'Temp °F (2)',
    ]);
  });

  test('row 23: an empty last header cell and its empty cells are nothing', () => {
    expect(valuesOf('Elapsed (s),Exhaust °F,\n0,70.1,\n10,74.5,\n20,80.25,\n')).toEqual(READ);
  });

  test('row 38: humidity, battery and comments are kept by name and are no channel', () => {
    const text =
      'Elapsed (s),RH %,Battery (V),Exhaust °F,Comment\n0,45,3.61,70.1,start\n10,46,3.60,74.5,\n20,47,3.60,80.25,door\n';
    const reading = readingOf(text);

    expect(reading.channel).toBe('Exhaust °F');
    expect(reading.channels).toEqual([]);
    expect(reading.columns.map(({ role }) => role)).toEqual([
      'time',
      'humidity',
      'other',
      'temperature',
      'comment',
    ]);
  });

  test('row 38: the exhaust is chosen before the room, wherever it stands', () => {
    const text = 'Elapsed (s),Room °F,Exhaust °F\n0,70,90\n10,71,120\n20,90,121\n';

    expect(readingOf(text).channel).toBe('Exhaust °F');
    expect(readingOf(text).channels).toMatchObject([{ name: 'Room °F', unit: 'F' }]);
  });

  test('row 20: among nameless probes the one that swings is chosen', () => {
    const rows = Array.from(
      { length: 40 },
      (_, i) => `${i},${70 + (i % 2) / 10},${100 + (i % 20)}`,
    );
    const text = `Elapsed (s),Probe 1 °F,Probe 2 °F\n${rows.join('\n')}\n`;

    expect(readingOf(text).channel).toBe('Probe 2 °F');
  });

  test('two that swing alike are asked about, and a choice is kept', () => {
    const rows = Array.from({ length: 40 }, (_, i) => `${i},${150 - (i % 20)},${100 + (i % 20)}`);
    const text = `Elapsed (s),Probe 1 °F,Probe 2 °F\n${rows.join('\n')}\n`;

    expect(questionOf(text)).toMatchObject({
      about: 'channel',
      options: [{ answer: 'Probe 1 °F' }, { answer: 'Probe 2 °F' }],
    });
    expect(readingOf(text, { channel: 'Probe 2 °F' }).temps[0]).toBe(100);
    expect(readingOf(text, { answers: { channel: 'Probe 1 °F' } }).temps[0]).toBe(150);
  });

  test('a channel that is not there is refused with the names that are', () => {
    expect(problemOf(`Elapsed (s),Exhaust °F\n${ROWS}`, { channel: 'Outlet' })).toMatchObject({
      code: 'unknown-channel',
      value: 'Outlet',
      message: 'There is no temperature column "Outlet". There are: Exhaust °F.',
    });
  });

  test('row 27: °F and °C of one probe are one run, and a disagreement is said', () => {
    const agree = 'Elapsed (s),Exhaust °F,Exhaust °C\n0,68,20\n10,77,25\n20,86,30\n';
    const differ = 'Elapsed (s),Exhaust °F,Exhaust °C\n0,68,20\n10,77,25.4\n20,86,30\n';

    expect(readingOf(agree)).toMatchObject({ channel: 'Exhaust °F' });
    expect(warningsOf(agree)).not.toContain('channels-disagree');
    expect(warningsOf(differ)).toContain('channels-disagree');
  });
});

describe('rows that are no readings', () => {
  test('row 18: a footer and a block of statistics are set aside', () => {
    const text = `Elapsed (s),Exhaust °F\n${ROWS}\nMinimum,70.1\nAverage,74.95\nEnd of file\n`;

    expect(valuesOf(text)).toEqual(READ);
    expect(readingOf(text).skippedRows).toEqual([
      { row: 6, why: 'not a time: Minimum' },
      { row: 7, why: 'not a time: Average' },
      { row: 8, why: 'not a time: End of file' },
    ]);
  });

  test('row 19: a header that comes again is passed over and said', () => {
    const text = `Elapsed (s),Exhaust °F\n${ROWS}Elapsed (s),Exhaust °F\n30,81\n`;

    expect(valuesOf(text).temp).toEqual([...READ.temp, 81]);
    expect(readingOf(text).warnings).toContainEqual({
      code: 'header-repeated',
      row: 5,
      message: 'The header comes again once, in row 5.',
    });
  });

  test('row 72: a second table with other columns is refused at its row', () => {
    const text = `Elapsed (s),Exhaust °F\n${ROWS}Elapsed (s),Exhaust °C\n30,27\n`;

    expect(problemOf(text)).toMatchObject({ code: 'columns-change', row: 5 });
  });

  test('row 64: a short row, a long row and an open quote cost their own row only', () => {
    const text =
      'Elapsed (s),Exhaust °F,Room °F\n0,70,68\n10,74\n20,80,68,1\n30,"85,68\n40,90,68\n50,95,68\n60,96,69\n70,97,69\n';

    expect(readingOf(text).skippedRows).toEqual([
      { row: 3, why: '2 cells where 3 are expected' },
      { row: 4, why: '4 cells where 3 are expected' },
      { row: 5, why: 'a quote is never closed' },
    ]);
    expect(valuesOf(text).t).toEqual([0, 40, 50, 60, 70]);
  });

  test('a file of which most rows cannot be read is refused at the first', () => {
    const text = 'Elapsed (s),Exhaust °F\n0,70\n10,71\n20,72\n' + 'x,y\n'.repeat(20);

    expect(problemOf(text)).toMatchObject({ code: 'mostly-unreadable', row: 5 });
  });

  test('row 66: a last line that is cut off loses its reading and is said', () => {
    const whole = 'Elapsed (s),Exhaust °F\n0,70.1\n10,74.5\n20,80.2\n30,85.4\n40,89.9\n';

    expect(warningsOf(whole)).toEqual([]);
    for (const cut of ['50,9', '50,93.', '50', '5']) {
      expect(valuesOf(whole + cut).temp).toEqual([70.1, 74.5, 80.2, 85.4, 89.9]);
      expect(warningsOf(whole + cut)).toContain('truncated-line');
    }
    expect(valuesOf(`${whole}50,93.1`).temp.at(-1)).toBe(93.1);
  });
});
