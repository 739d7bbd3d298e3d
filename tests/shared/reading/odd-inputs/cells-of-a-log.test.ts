import { describe, expect, test } from 'vitest';
import { problemOf, questionOf, readingOf, valuesOf, warningsOf } from '../read-text.ts';

const READ = { t: [0, 10, 20, 30], temp: [70.1, 74.5, 80.25, 86] };

describe('delimiters', () => {
  test.each([
    ['semicolons', ';'],
    ['tabs', '\t'],
    ['pipes', '|'],
    ['commas with spaces', ', '],
    ['spaces', '   '],
  ])('rows 8, 9: %s part columns', (_, delimiter) => {
    const lines = ['Elapsed_s,Exhaust_F', '0,70.1', '10,74.5', '20,80.25', '30,86', ''];
    const text = lines.join('\n').replaceAll(',', delimiter);

    expect(valuesOf(text)).toEqual(READ);
  });

  test('row 10: a first line sep= says the delimiter', () => {
    const text = 'sep=;\nElapsed (s);Exhaust °F\n0;70.1\n10;74.5\n20;80.25\n30;86\n';

    expect(valuesOf(text)).toEqual(READ);
    expect(readingOf(text).delimiter).toBe(';');
  });

  test('quoted cells may hold the delimiter and quotes', () => {
    const text =
      '"Elapsed (s)","Exhaust, °F","Note"\n"0","70.1","start, ""cold"""\n"10","74.5",""\n"20","80.25",""\n"30","86",""\n';

    expect(valuesOf(text)).toEqual(READ);
    expect(readingOf(text).channel).toBe('Exhaust, °F');
  });
});

describe('decimal marks', () => {
  test('row 11: a comma is the decimal mark beside semicolons and tabs', () => {
    const text = 'Elapsed (s);Exhaust °F\n0;70,1\n10;74,5\n20;80,25\n30;86\n';

    expect(valuesOf(text)).toEqual(READ);
    expect(readingOf(text).decimal).toBe(',');
    expect(valuesOf(text.replaceAll(';', '\t'))).toEqual(READ);
  });

  test('row 12: a quoted decimal comma is read beside commas', () => {
    const text = 'Elapsed (s),Exhaust °F\n0,"70,1"\n10,"74,5"\n20,"80,25"\n30,"86"\n';

    expect(valuesOf(text)).toEqual(READ);
  });

  test('row 13: an unquoted decimal comma beside commas is refused with row and remedy', () => {
    const text = 'Elapsed (s),Exhaust °F\n0,70,1\n10,74,5\n20,80,2\n30,86,0\n';

    expect(problemOf(text)).toEqual({
      code: 'column-count',
      row: 2,
      column: null,
      value: null,
      message: 'Row 2 has 3 cells where the header has 2 columns.',
      hint: 'If the readings use decimal commas, export with semicolons between the columns.',
    });
  });

  test.each([
    ['1,234.5', ',', '.'],
    ['1.234,5', ';', ','],
    ['1 234,5', ';', ','],
    ['1\u00a0234,5', ';', ','],
    ['1\u2009234,5', ';', ','],
    ["1'234.5", ';', '.'],
  ])('row 14: %s groups its thousands', (grouped, delimiter) => {
    const cell = delimiter === ',' ? `"${grouped}"` : grouped;
    const mark = grouped.at(-2) ?? '.';
    const rows = [`0,${cell}`, `10,990${mark}5`, `20,980${mark}25`].map((row) =>
      delimiter === ',' ? row : row.replace(',', delimiter),
    );
    const text = `Elapsed (s)${delimiter}Pit °C\n${rows.join('\n')}\n`;

    expect(problemOf(text)).toMatchObject({ code: 'out-of-range', row: 2, value: '1234.5' });
  });

  test('row 15: a comma before three digits everywhere is asked about where both make sense', () => {
    const text = 'Elapsed (s);Exhaust °F\n0;1,070\n10;1,074\n20;1,081\n';

    expect(questionOf(text)).toMatchObject({
      about: 'decimal',
      options: [{ answer: 'comma' }, { answer: 'point' }],
    });
    expect(valuesOf(text, { answers: { decimal: 'comma' } }).temp).toEqual([1.07, 1.074, 1.081]);
  });

  test('row 15: a comma before three digits is a decimal mark where thousands would be no temperature', () => {
    const text = 'Elapsed (s);Exhaust °F\n0;70,125\n10;74,250\n20;80,375\n';

    expect(valuesOf(text).temp).toEqual([70.125, 74.25, 80.375]);
  });
});

describe('numbers', () => {
  test.each([
    ['+70.1', 70.1],
    ['7.01E+1', 70.1],
    ['.5', 0.5],
    ['70.', 70],
    ['\u221240.1', -40.1],
    ['\u201340.1', -40.1],
    ['７０.１', 70.1],
    ['٧٠.١', 70.1],
    ['-0.4', -0.4],
    [' 70.1 ', 70.1],
  ])('rows 34, 35: %s is a reading', (cell, value) => {
    const text = `Elapsed (s),Exhaust °C\n0,${cell}\n10,${cell}\n20,${cell}\n`;

    expect(valuesOf(text).temp).toEqual([value, value, value]);
  });

  test('every digit of a reading is kept bit for bit', () => {
    const cells = ['130.2', '0.1', '154.99999999999997', '68.333333333333329', '1e-7', '20.05'];
    const rows = cells.map((cell, i) => `${i},${cell}`).join('\n');

    expect(valuesOf(`Elapsed (s),Exhaust °C\n${rows}\n`).temp).toEqual(cells.map(Number));
  });

  test.each(['1e999', '9'.repeat(400)])(
    'row 36: a number too large for a reading is refused: %.10s',
    (cell) => {
      const text = `Elapsed (s),Exhaust °F\n0,70.1\n10,${cell}\n20,80\n`;

      expect(problemOf(text)).toMatchObject({
        code: 'number-too-large',
        row: 3,
        column: 'Exhaust °F',
        value: cell.slice(0, 40),
      });
    },
  );

  test('row 35: brackets are not taken for a reading', () => {
    const text = 'Elapsed (s),Exhaust °F\n0,70.1\n10,(5.0)\n20,80\n30,81\n';

    expect(readingOf(text).skippedRows).toEqual([{ row: 3, why: 'not a number: (5.0)' }]);
  });

  test('row 71: formulas and markup are text', () => {
    const text = 'Elapsed (s),Exhaust °F,=1+1\n0,70,@SUM(A1)\n10,71,<b>x</b>\n20,72,+cmd\n';

    expect(valuesOf(text).temp).toEqual([70, 71, 72]);
    expect(readingOf(text).columns[2]).toMatchObject({ name: '=1+1', role: 'other' });
  });
});

describe('cells without a reading', () => {
  test.each([
    'OL',
    'O.L',
    '----',
    'Open',
    'ERR',
    'NC',
    'NaN',
    'Inf',
    '-inf',
    '#N/A',
    '#VALUE!',
    'null',
    'None',
  ])('rows 30, 32: %s leaves its row out and says so', (word) => {
    const text = `Elapsed (s),Exhaust °F\n0,70.1\n10,${word}\n20,80.25\n30,86\n`;
    const reading = readingOf(text);

    expect(valuesOf(text)).toEqual({ t: [0, 20, 30], temp: [70.1, 80.25, 86] });
    expect(reading.skippedRows).toEqual([{ row: 3, why: `not a number: ${word}` }]);
    expect(reading.rows).toBe(4);
    expect(warningsOf(text)).toContain('open-sensor');
  });

  test.each(['', '   ', '-', '.'])('row 33: an empty cell "%s" is no reading', (cell) => {
    const text = `Elapsed (s),Exhaust °F\n0,70.1\n10,${cell}\n20,80.25\n30,86\n`;

    expect(valuesOf(text)).toEqual({ t: [0, 20, 30], temp: [70.1, 80.25, 86] });
    expect(readingOf(text).skippedCount).toBe(1);
  });

  test('row 37: a probe that dies half-way leaves its gap to itself', () => {
    const text =
      'Elapsed (s),Exhaust °F,Room °F\n0,70,68\n10,75,68\n20,81,OL\n30,86,OL\n40,90,OL\n';
    const reading = readingOf(text);

    expect(Array.from(reading.temps)).toEqual([70, 75, 81, 86, 90]);
    expect(Array.from(reading.channels[0]!.temps)).toEqual([68, 68, NaN, NaN, NaN]);
  });
});

describe('numbers that stand for no reading', () => {
  const rise = (cells: string[]) =>
    `Elapsed (s),Exhaust °C\n${cells.map((cell, i) => `${i * 5},${cell}`).join('\n')}\n`;

  test.each(['-999.9', '-9999', '9999', '6553.5', '32767', '127', '-127'])(
    'row 31: %s is left out where it stands out',
    (value) => {
      const text = rise(['40.1', '42.3', value, value, '48.2', '50.4']);

      expect(valuesOf(text).temp).toEqual([40.1, 42.3, 48.2, 50.4]);
      expect(warningsOf(text)).toContain('sentinel-excluded');
      expect(readingOf(text).skippedRows.map(({ row }) => row)).toEqual([4, 5]);
    },
  );

  test('row 31: 85.0 at power-on is left out', () => {
    expect(valuesOf(rise(['85.0', '21.3', '21.4', '21.6', '22.1'])).temp).toEqual([
      21.3, 21.4, 21.6, 22.1,
    ]);
  });

  test('row 31: 85.0 and 127 in the middle of a plausible curve are readings', () => {
    const near85 = ['79.5', '82.0', '85.0', '87.5', '85.0', '82.0'];
    const near127 = ['120.5', '124', '127', '129', '127', '124'];

    expect(valuesOf(rise(near85)).temp).toEqual([79.5, 82, 85, 87.5, 85, 82]);
    expect(valuesOf(rise(near127)).temp).toEqual([120.5, 124, 127, 129, 127, 124]);
  });

  test('row 62: a winter reading below nought is no sentinel', () => {
    const text = 'Elapsed (s),Exhaust °F\n0,-4.5\n10,-1\n20,3.5\n30,9\n';

    expect(valuesOf(text).temp).toEqual([-4.5, -1, 3.5, 9]);
  });
});
