import { expect, test } from 'vitest';
import type { ReadPreview } from '#shared/schemas/uploads.ts';
import { corrections, delimiterWords } from '#client/pages/upload/preview/corrections.ts';
import { shareOf, timeAtPx } from '#client/pages/upload/preview/strip-place.ts';

type Understood = Parameters<typeof corrections>[0];

const understood: Understood = {
  columns: [{ index: 1, name: 'Exhaust', role: 'temperature', unit: 'F', unitFrom: 'header' }],
  channel: 'Exhaust',
  channelUnit: 'F',
  clock: 'seconds',
  startedAt: null,
  decimal: '.',
  encoding: 'utf-8',
} satisfies Partial<ReadPreview>;

function subjectsOf(preview: Understood) {
  return corrections(preview)
    .filter(({ options }) => options.length > 0)
    .map(({ about }) => about);
}

function optionsAbout(about: string, preview: Understood) {
  const found = corrections(preview).find((correction) => correction.about === about);
  return found?.options.map(({ answer }) => answer);
}

test('what was found is told with what says so', () => {
  const [unit] = corrections(understood);

  expect(unit?.found).toBe('°F, from header');
});

test('a column of plain numbers can be read in another unit of time', () => {
  expect(optionsAbout('clock', understood)).toEqual([
    'seconds',
    'minutes',
    'hours',
    'milliseconds',
  ]);
});

test('times of two fields can be minutes and seconds or hours and minutes', () => {
  expect(optionsAbout('clock', { ...understood, clock: 'elapsed m:ss' })).toEqual(['m:ss', 'h:mm']);
  expect(optionsAbout('clock', { ...understood, clock: 'time of day h:mm' })).toEqual([
    'm:ss',
    'h:mm',
  ]);
});

test('a stamp that says everything leaves nothing to choose about the clock', () => {
  const iso = { ...understood, clock: 'ISO 8601', startedAt: '2026-03-04 10:15:00' };

  expect(subjectsOf(iso)).toEqual(['unit', 'decimal', 'encoding']);
});

test('the order of day and month is offered where the dates have one', () => {
  const dated = { ...understood, clock: 'day first', startedAt: '2026-03-04 10:15:00' };

  expect(optionsAbout('date-order', dated)).toEqual(['day-first', 'month-first', 'year-first']);
  expect(optionsAbout('date-order', understood)).toBeUndefined();
});

test('delimiters are named', () => {
  expect([',', ';', '\t', '~'].map(delimiterWords)).toEqual(['comma', 'semicolon', 'tab', '“~”']);
});

test('a place on the strip and its moment are each other’s reverse', () => {
  for (const timeS of [0, 300, 900]) {
    expect(timeAtPx(shareOf(timeS, 900, 390) * 390, 900, 390)).toBeCloseTo(timeS, 6);
  }
});
