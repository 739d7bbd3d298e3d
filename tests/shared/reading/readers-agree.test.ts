import fc from 'fast-check';
import { expect, test } from 'vitest';
import { detectLayout } from '#shared/reading/layout/detect-layout.ts';
import { sampleLines } from '#shared/reading/layout/sample-lines.ts';
import { readRows } from '#shared/reading/rows/read-rows.ts';
import { decodeText } from '#shared/reading/text/decode-text.ts';
import { textDecoderFor } from '#shared/reading/text/split-lines.ts';
import { valuesOf } from './read-text.ts';
import { writeLog, writingArbitrary, type Writing } from './write-log.ts';

const seed = 20260504;

const seriesArbitrary = fc
  .array(
    fc.record({
      stepTenths: fc.integer({ min: 1, max: 600 }),
      tempHundredths: fc.integer({ min: 2_000, max: 19_999 }),
    }),
    { minLength: 6, maxLength: 40 },
  )
  .map((rows) => {
    let tenths = 0;
    const t = rows.map(({ stepTenths }, i) => (i === 0 ? 0 : (tenths += stepTenths)) / 10);
    return { t, temp: rows.map(({ tempHundredths }) => tempHundredths / 100) };
  });

function bothReaders(bytes: Uint8Array) {
  const text = decodeText(bytes);
  const decode = textDecoderFor(text.encoding);
  const plan = detectLayout(sampleLines(text.bytes, decode), {});
  if (plan.kind !== 'layout') throw new Error(JSON.stringify(plan));
  return [false, true].map((carefulOnly) => {
    const rows = readRows({ text, layout: plan.layout, decode, carefulOnly });
    if (rows.kind !== 'rows') return rows;
    const { store } = rows;
    return {
      ticks: Array.from(store.ticks.subarray(0, store.count)),
      rows: Array.from(store.rows.subarray(0, store.count)),
      temps: store.temps.map((temps) => Array.from(temps.subarray(0, store.count))),
      unread: store.unread.rows,
      noReading: store.noReading.map(({ rows: list }) => list),
      offsetTicks: rows.facts.offsetTicks,
      oddForms: rows.facts.oddForms,
    };
  });
}

/** Rows that no plan foresees, among rows that it does. */
const oddRows = fc.array(
  fc.oneof(
    fc.constantFrom(
      '',
      'x',
      '1',
      'OL,OL',
      '"',
      '"1","2',
      '10,70.,',
      '5,,',
      ',,,',
      '12,1e2',
      '+3,+4.50',
      '07,007.10',
    ),
    fc
      .tuple(fc.integer({ min: 0, max: 9999 }), fc.stringMatching(/^[-+ .,:"0-9a-zF°]{0,12}$/))
      .map(([time, cell]) => `${time},${cell}`),
    fc.stringMatching(/^[-+ .,:;"0-9TZ]{0,30}$/),
  ),
  { maxLength: 12 },
);

test('the quick reader and the careful reader read every written layout alike', () => {
  fc.assert(
    fc.property(seriesArbitrary, writingArbitrary, (series, writing) => {
      const [quick, careful] = bothReaders(writeLog(series, writing));

      expect(quick).toEqual(careful);
    }),
    { seed, numRuns: 300 },
  );
});

test('they read odd rows among good ones alike', () => {
  fc.assert(
    fc.property(seriesArbitrary, oddRows, ({ t, temp }, odd) => {
      const good = t.map((time, i) => `${time},${temp[i]}`);
      const text = ['Elapsed (s),Exhaust °F', ...good, ...odd, ...good.slice(-2), ''].join('\n');
      const [quick, careful] = bothReaders(new TextEncoder().encode(text));

      expect(quick).toEqual(careful);
    }),
    { seed, numRuns: 600 },
  );
});

test('a series written in any layout reads back equal', () => {
  fc.assert(
    fc.property(seriesArbitrary, writingArbitrary, (series, writing) => {
      const read = valuesOf(writeLog(series, writing), { answers: answersFor(writing) });

      expect(read.temp).toEqual(series.temp);
      expect(read.t).toEqual(series.t.map((s) => expect.closeTo(s, 6)));
    }),
    { seed, numRuns: 400 },
  );
});

function answersFor({ clock }: Writing) {
  return clock === 'day-first' ? { 'date-order': 'day-first' } : {};
}
