import { expect, test } from 'vitest';
import { dayBounds, dayOf } from '#server/jobs/shop-day.ts';

const HOUR_MS = 3_600_000;
const bounds = (day: string, zone: string) => {
  const { fromMs, toMs } = dayBounds(day, zone);
  return [new Date(fromMs).toISOString(), (toMs - fromMs) / HOUR_MS];
};

// Rules of the zones: IANA time zone database, https://www.iana.org/time-zones
test('a day begins at midnight of the shop and is 24 h long', () => {
  expect(bounds('2026-03-04', 'America/New_York')).toEqual(['2026-03-04T05:00:00.000Z', 24]);
  expect(bounds('2026-07-01', 'America/New_York')).toEqual(['2026-07-01T04:00:00.000Z', 24]);
  expect(bounds('2026-03-04', 'UTC')).toEqual(['2026-03-04T00:00:00.000Z', 24]);
  expect(bounds('2026-03-04', 'Asia/Kathmandu')).toEqual(['2026-03-03T18:15:00.000Z', 24]);
  expect(bounds('2026-03-04', 'Pacific/Kiritimati')).toEqual(['2026-03-03T10:00:00.000Z', 24]);
});

test('a day on which clocks change is 23 or 25 h long', () => {
  // United States 2026: 8 March and 1 November, at 2:00.
  expect(bounds('2026-03-08', 'America/New_York')).toEqual(['2026-03-08T05:00:00.000Z', 23]);
  expect(bounds('2026-11-01', 'America/New_York')).toEqual(['2026-11-01T04:00:00.000Z', 25]);
});

test('where midnight itself is skipped the day begins at one', () => {
  // Chile 2026: clocks go from 0:00 to 1:00 on 6 September.
  expect(bounds('2026-09-06', 'America/Santiago')).toEqual(['2026-09-06T04:00:00.000Z', 23]);
});

test('an instant falls on the day that the shop’s calendar shows', () => {
  const lateEveningMs = Date.parse('2026-03-05T04:59:59.999Z');

  expect(dayOf(lateEveningMs, 'America/New_York')).toBe('2026-03-04');
  expect(dayOf(lateEveningMs + 1, 'America/New_York')).toBe('2026-03-05');
});

test('instants all over a year lie within the bounds of their day', () => {
  for (const zone of ['America/New_York', 'America/Santiago', 'Australia/Lord_Howe']) {
    for (let atMs = Date.UTC(2026, 0); atMs < Date.UTC(2027, 0); atMs += 31.3 * HOUR_MS) {
      const { fromMs, toMs } = dayBounds(dayOf(atMs, zone), zone);
      expect(atMs >= fromMs && atMs < toMs ? 'inside' : new Date(atMs).toISOString()).toBe(
        'inside',
      );
    }
  }
});
