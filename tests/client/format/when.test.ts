import { describe, expect, test } from 'vitest';
import {
  clockOf,
  dateWords,
  dayOf,
  daysBetween,
  dayWords,
  instantAt,
  longDateWords,
  momentWords,
  spanWords,
  timeWords,
} from '#client/format/when.ts';

const NEW_YORK = 'America/New_York';
const at = (iso: string) => Date.parse(iso);

describe('instants in the shop’s zone', () => {
  test('belong to the shop’s day, whatever day it is in UTC', () => {
    expect(dayOf(at('2026-04-29T02:30:00Z'), NEW_YORK)).toBe('2026-04-28');
    expect(dayOf(at('2026-04-28T23:30:00Z'), 'Asia/Tokyo')).toBe('2026-04-29');
    expect(clockOf(at('2026-04-28T20:30:00Z'), NEW_YORK)).toBe('16:30');
  });

  test('read as one of twelve working hours, and say am or pm outside them', () => {
    const words = (clock: string) => timeWords(at(`2026-04-28T${clock}:00Z`), 'UTC');

    expect(['07:00', '12:00', '16:30', '18:59'].map(words)).toEqual([
      '7:00',
      '12:00',
      '4:30',
      '6:59',
    ]);
    expect(['06:59', '19:00', '00:05'].map(words)).toEqual(['6:59 am', '7:00 pm', '12:05 am']);
  });

  test('name today, tomorrow and yesterday, and the year only where it is another', () => {
    const nowMs = at('2026-04-28T12:00:00Z');
    const words = (iso: string) => dayWords(at(iso), NEW_YORK, nowMs);

    expect(words('2026-04-29T03:59:00Z')).toBe('today');
    expect(words('2026-04-29T04:00:00Z')).toBe('tomorrow');
    expect(words('2026-04-28T03:59:00Z')).toBe('yesterday');
    expect(words('2026-03-14T12:00:00Z')).toBe('14 Mar');
    expect(dateWords(at('2025-12-03T12:00:00Z'), NEW_YORK, nowMs)).toBe('3 Dec 2025');
    expect(longDateWords(nowMs, NEW_YORK)).toBe('Tuesday 28 April');
    expect(momentWords(at('2026-04-28T20:30:00Z'), NEW_YORK, nowMs)).toBe('today, 4:30');
  });

  test('are whole days apart even over a day of 23 hours', () => {
    // Clocks went forward in New York on 8 March 2026.
    expect(daysBetween(at('2026-03-07T17:00:00Z'), at('2026-03-09T16:00:00Z'), NEW_YORK)).toBe(2);
    expect(daysBetween(at('2026-03-14T12:00:00Z'), at('2026-04-28T12:00:00Z'), NEW_YORK)).toBe(45);
  });
});

describe('a wall clock in the shop’s zone', () => {
  test('is the instant that reads as it, in winter and in summer', () => {
    expect(instantAt('2026-01-15', '10:00', NEW_YORK)).toBe(at('2026-01-15T15:00:00Z'));
    expect(instantAt('2026-07-15', '10:00', NEW_YORK)).toBe(at('2026-07-15T14:00:00Z'));
    expect(instantAt('2026-07-15', '10:00', 'Asia/Kolkata')).toBe(at('2026-07-15T04:30:00Z'));
  });

  test('comes back as it was typed on both sides of a change of clocks', () => {
    for (const [day, clock] of [
      ['2026-03-08', '01:30'],
      ['2026-03-08', '03:30'],
      ['2026-11-01', '00:30'],
      ['2026-11-01', '03:30'],
    ] as const) {
      const instant = instantAt(day, clock, NEW_YORK);

      expect(instant).not.toBeNull();
      expect([dayOf(instant ?? 0, NEW_YORK), clockOf(instant ?? 0, NEW_YORK)]).toEqual([
        day,
        clock,
      ]);
    }
  });

  test('that comes twice in autumn means the first', () => {
    expect(instantAt('2026-11-01', '01:30', NEW_YORK)).toBe(at('2026-11-01T05:30:00Z'));
  });

  test('that spring skips lies an hour on', () => {
    expect(instantAt('2026-03-08', '02:30', NEW_YORK)).toBe(at('2026-03-08T07:30:00Z'));
  });

  test('that cannot be read is no instant', () => {
    expect(instantAt('2026-02-30x', '10:00', NEW_YORK)).toBeNull();
    expect(instantAt('2026-02-20', '', NEW_YORK)).toBeNull();
  });
});

test('a span is minutes and seconds, with hours from an hour on', () => {
  expect([0, 12, 227, 3725].map(spanWords)).toEqual(['0:00', '0:12', '3:47', '1:02:05']);
});
