import { describe, expect, test } from 'vitest';
import { questionOf, readingOf, valuesOf, warningsOf } from '../read-text.ts';

const log = (rows: string[]) => `Time,Exhaust °F\n${rows.join('\n')}\n`;

describe('rows in another order', () => {
  test('row 53: newest first is turned round', () => {
    const text = log([
      '2026-05-04 10:00:30,73',
      '2026-05-04 10:00:20,72',
      '2026-05-04 10:00:10,71',
      '2026-05-04 10:00:00,70',
    ]);

    expect(valuesOf(text)).toEqual({ t: [0, 10, 20, 30], temp: [70, 71, 72, 73] });
    expect(warningsOf(text)).toContain('reversed');
  });

  test('row 52: a straggler is put in its place', () => {
    const text = log([
      '2026-05-04 10:00:00,70',
      '2026-05-04 10:00:20,72',
      '2026-05-04 10:00:10,71',
      '2026-05-04 10:00:30,73',
    ]);

    expect(valuesOf(text)).toEqual({ t: [0, 10, 20, 30], temp: [70, 71, 72, 73] });
    expect(readingOf(text).warnings[0]).toMatchObject({ code: 'reordered' });
  });

  test('row 52: a clock that starts again is two runs, and one is asked for', () => {
    const text = `Elapsed (s),Exhaust °F\n${['0,70', '60,71', '120,72', '180,80', '1300,90', '0,60', '60,61', '120,62'].join('\n')}\n`;

    expect(questionOf(text)).toMatchObject({
      about: 'runs',
      options: [
        { answer: '1', label: 'run 1: rows 2 to 6' },
        { answer: '2', label: 'run 2: rows 7 to 9' },
      ],
    });
    expect(valuesOf(text, { answers: { runs: '2' } })).toEqual({
      t: [0, 60, 120],
      temp: [60, 61, 62],
    });
    expect(readingOf(text, { answers: { runs: '2' } }).skippedCount).toBe(5);
  });

  test('row 52: pieces of one record in another order are put in order', () => {
    const late = Array.from(
      { length: 30 },
      (_, i) => `2026-05-04 11:${String(i).padStart(2, '0')}:00,${100 + i}`,
    );
    const early = Array.from(
      { length: 30 },
      (_, i) => `2026-05-04 10:${String(i).padStart(2, '0')}:00,${60 + i}`,
    );

    expect(valuesOf(log([...late, ...early])).temp.slice(28, 32)).toEqual([88, 89, 100, 101]);
  });
});

describe('equal stamps', () => {
  test('row 50: readings under a stamp of a minute are spread evenly over it', () => {
    const rows = ['10:00', '10:00', '10:01', '10:01', '10:01', '10:02', '10:02', '10:02', '10:03'];
    const text = `hh:mm,Exhaust °F\n${rows.map((stamp, i) => `${stamp},${70 + i}`).join('\n')}\n`;

    expect(valuesOf(text).t).toEqual([0, 20, 40, 60, 80, 100, 120, 140, 160]);
    expect(warningsOf(text)).toContain('spread-in-stamp');
  });

  test('rows 50, 51: rows alike under a coarse stamp are readings too', () => {
    const rows = [
      '2026-05-04 10:00:00',
      '2026-05-04 10:00:00',
      '2026-05-04 10:00:01',
      '2026-05-04 10:00:01',
    ];
    const text = log(rows.map((stamp) => `${stamp},70`));

    expect(valuesOf(text)).toEqual({ t: [0, 0.5, 1, 1.5], temp: [70, 70, 70, 70] });
  });

  test('row 51: a block that comes again is left out and counted', () => {
    const block = Array.from(
      { length: 10 },
      (_, i) => `2026-05-04 10:${String(i * 2).padStart(2, '0')}:00,${70 + i}`,
    );
    const text = log([...block, ...block.slice(2, 7)]);

    expect(valuesOf(text).temp).toEqual([70, 71, 72, 73, 74, 75, 76, 77, 78, 79]);
    expect(readingOf(text).warnings).toContainEqual({
      code: 'duplicates-dropped',
      row: 12,
      message: '5 repeated rows were left out, the first in row 12.',
    });
  });

  test('row 51: a row written twice between finer stamps is one reading', () => {
    const rows = Array.from(
      { length: 20 },
      (_, i) => `2026-05-04 10:00:${String(i).padStart(2, '0')},${70 + i}`,
    );
    const text = log([...rows.slice(0, 8), rows[7]!, ...rows.slice(8)]);

    expect(valuesOf(text).temp).toHaveLength(20);
    expect(readingOf(text).skippedRows).toEqual([{ row: 10, why: 'repeats an earlier row' }]);
  });
});

describe('gaps', () => {
  test('row 57: ten minutes without readings are said, with the row after them', () => {
    const rows = [0, 10, 20, 30, 40, 640, 650, 660].map((s) => `${s},70`);
    const text = `Elapsed (s),Exhaust °F\n${rows.join('\n')}\n`;

    expect(readingOf(text).warnings.filter(({ code }) => code === 'gap')).toEqual([
      { code: 'gap', row: 7, message: 'Nothing was recorded for 10 min before row 7.' },
    ]);
  });

  test('row 58: steps by hand and by events are no gaps', () => {
    const times = [0, 15, 40, 51, 70, 200, 215, 400, 411, 425, 600];
    const text = `Elapsed (s),Exhaust °F\n${times.map((s) => `${s},${70 + s / 10}`).join('\n')}\n`;

    expect(valuesOf(text).t).toEqual(times);
    expect(warningsOf(text).filter((code) => code === 'gap').length).toBeLessThan(4);
  });

  test('row 61: a probe that never moves is said', () => {
    expect(warningsOf('Elapsed (s),Exhaust °F\n0,70\n10,70\n20,70\n')).toContain('no-change');
  });
});
