import fc from 'fast-check';
import { expect, test } from 'vitest';
import { readLog } from '#shared/reading/read-log.ts';
import type { LogReading } from '#shared/reading/log-reading.ts';
import { readingOf } from './read-text.ts';

const seed = 20260504;

/** A run of a dryer: 80 readings that rise and fall between 120 and 160 °F, all different enough. */
const WHOLE = [
  'Time,Exhaust °F,Room °F,Comment',
  ...Array.from({ length: 80 }, (_, i) => {
    const stamp = new Date(Date.UTC(2026, 4, 14, 10, 0, i * 5)).toISOString().slice(0, 19);
    const temp = 140 + 20 * Math.sin(i / 6);
    return `${stamp}Z,${temp.toFixed(1)},${(70 + (i % 5) / 10).toFixed(1)},ok`;
  }),
  '',
].join('\n');
const BYTES = new TextEncoder().encode(WHOLE);
const reading = readingOf(BYTES);
const byTime = new Map(Array.from(reading.series.timesS, (t, i) => [t, reading.temps[i]!]));

/**
 * What damage may lead to: a refusal or a question by name, or a reading whose every kept pair stands in
 * the whole log, with a word for each that does not.
 */
function isHonest(bytes: Uint8Array): void {
  const outcome = readLog(bytes);
  if (outcome.kind === 'refused') {
    expect(outcome.problem.hint).not.toBe('');
    return;
  }
  if (outcome.kind === 'question') {
    expect(outcome.question.options.length).toBeGreaterThan(1);
    return;
  }
  const lost = reading.temps.length - outcome.reading.temps.length;
  if (lost > 0 && bytes.length >= BYTES.length) {
    // a lost line end makes one row of two
    expect(outcome.reading.skippedCount).toBeGreaterThan(0);
    expect(outcome.reading.warnings.length).toBeGreaterThan(0);
  }
  expect(strangers(outcome.reading)).toEqual([]);
}

/** Kept readings that the whole log does not have. */
function strangers({ series, temps, startedAt }: LogReading): number[] {
  const lateS = (Date.parse(`${startedAt}Z`) - Date.parse(`${reading.startedAt}Z`)) / 1000;
  return Array.from(temps).filter((temp, i) => byTime.get(series.timesS[i]! + lateS) !== temp);
}

test('a log cut off anywhere gives the readings before the cut, or a refusal', () => {
  for (let length = 0; length < BYTES.length; length += 11) isHonest(BYTES.subarray(0, length));
});

test('a stray quote anywhere costs at most its own row', () => {
  fc.assert(
    fc.property(fc.integer({ min: 0, max: BYTES.length }), (at) => {
      const bytes = new Uint8Array(BYTES.length + 1);
      bytes.set(BYTES.subarray(0, at));
      bytes[at] = 34;
      bytes.set(BYTES.subarray(at), at + 1);

      isHonest(bytes);
    }),
    { seed, numRuns: 250 },
  );
});

test('a missing or doubled delimiter costs at most its own row', () => {
  const commas = [...BYTES.keys()].filter((i) => BYTES[i] === 44);
  for (const at of commas.filter((_, i) => i < 12 || i % 7 === 0)) {
    isHonest(Uint8Array.from([...BYTES.subarray(0, at), ...BYTES.subarray(at + 1)]));
    isHonest(Uint8Array.from([...BYTES.subarray(0, at), 44, ...BYTES.subarray(at)]));
  }
});

test('a byte turned into one that no number has gives no wrong reading', () => {
  const strange = fc
    .integer({ min: 0, max: 255 })
    .filter((byte) => !/[-+.,\d:eE \n\r]/.test(String.fromCharCode(byte)));
  fc.assert(
    fc.property(fc.integer({ min: 0, max: BYTES.length - 1 }), strange, (at, byte) => {
      const bytes = BYTES.slice();
      bytes[at] = byte;

      isHonest(bytes);
    }),
    { seed, numRuns: 800 },
  );
});

test('bytes of any kind never throw', () => {
  fc.assert(
    fc.property(fc.uint8Array({ maxLength: 400 }), (bytes) => {
      expect(['read', 'question', 'refused']).toContain(readLog(bytes).kind);
    }),
    { seed, numRuns: 800 },
  );
});

test('text of any kind never throws', () => {
  const line = fc.stringMatching(/^[-+ .,:;"0-9TZa-f°/\t]{0,40}$/);
  fc.assert(
    fc.property(fc.array(line, { maxLength: 12 }), (lines) => {
      const bytes = new TextEncoder().encode(lines.join('\n'));

      expect(['read', 'question', 'refused']).toContain(readLog(bytes).kind);
    }),
    { seed, numRuns: 800 },
  );
});
