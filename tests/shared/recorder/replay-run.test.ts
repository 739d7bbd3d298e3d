import { describe, expect, test } from 'vitest';
import { clockSpans } from '#shared/recorder/clock-spans.ts';
import { guardAfter, guardOfRun } from '#shared/recorder/guard-run.ts';
import { lastToTakeBack, replayRun } from '#shared/recorder/replay-run.ts';
import { isRunEvent, type RunEvent } from '#shared/recorder/run-event.ts';
import { seriesOfRun } from '#shared/recorder/series-of-run.ts';
import { beatAt, toRhythm } from '#shared/recorder/rhythm.ts';
import { otherValueOf, typeOther } from '#shared/recorder/other-value.ts';

const SETUP = {
  placement: '',
  duct: null,
  load: null,
  setting: 'high',
  roomTemp: null,
  probeId: null,
} as const;

/** A run's events from what happened in them; ids are `e0`, `e1` … in order. */
function eventsOf(...happenings: (Partial<RunEvent> & { atS: number })[]): RunEvent[] {
  const stamped = (n: number, atS: number) => ({ id: `e${n}`, runId: 'r', n, atS, wallMs: atS });
  const start: RunEvent = {
    ...stamped(0, 0),
    ...{ kind: 'start', visitId: 'v', label: 'Run 1', unit: 'F', hasTenths: false, setup: SETUP },
  };
  const rest = happenings.map((happening, i) => ({
    ...stamped(i + 1, happening.atS),
    ...happening,
  }));
  return [start, ...rest.filter(isRunEvent)];
}

const reading = (atS: number, temp: number) =>
  ({ kind: 'reading', atS, temp, from: 'hand' }) as const;

function replayed(events: RunEvent[]) {
  const run = replayRun(events);
  if (!run) throw new Error('no run');
  return run;
}

describe('replayRun', () => {
  test('keeps both values of a correction, and the time of the reading', () => {
    const run = replayed(
      eventsOf(reading(10, 92), { kind: 'correction', atS: 40, of: 'e1', temp: 91 }),
    );

    expect(run.readings).toMatchObject([{ atS: 10, temp: 91, typed: 92 }]);
    expect(run.corrections).toMatchObject([{ atS: 10, was: 92, now: 91, correctedAtS: 40 }]);
  });

  test('takes back readings, marks and corrections, the newest first', () => {
    const events = eventsOf(
      reading(10, 92),
      { kind: 'mark', atS: 12, mark: 'click', text: null },
      { kind: 'correction', atS: 40, of: 'e1', temp: 91 },
    );
    expect(lastToTakeBack(events)?.id).toBe('e3');

    const undo: RunEvent = {
      id: 'u',
      runId: 'r',
      n: 4,
      atS: 41,
      wallMs: 41,
      kind: 'undo',
      takes: 'e3',
    };
    const run = replayed([...events, undo]);

    expect(run.readings).toMatchObject([{ temp: 92 }]);
    expect(run.corrections).toEqual([]);
    expect(lastToTakeBack([...events, undo])?.id).toBe('e2');
  });

  test('is the same whatever order the events come in, and however often', () => {
    const events = eventsOf(reading(10, 92), reading(20, 95), {
      kind: 'undo',
      atS: 21,
      takes: 'e2',
    });

    expect(replayRun([...events].reverse().concat(events))).toEqual(replayRun(events));
  });

  test('is nothing without its start', () => {
    expect(replayRun(eventsOf(reading(10, 92)).slice(1))).toBeNull();
  });

  test('orders readings by when the finger went down', () => {
    const run = replayed(eventsOf(reading(20, 95), reading(10, 92)));

    expect(run.readings.map(({ atS }) => atS)).toEqual([10, 20]);
  });
});

describe('seriesOfRun', () => {
  test('counts from the first reading, in °C, with the values as typed beside it', () => {
    const events = eventsOf(
      { kind: 'mark', atS: 2, mark: 'flame-on', text: null },
      ...[reading(4, 32), reading(14, 212), reading(24, 122)],
      { kind: 'mark', atS: 15, mark: 'click', text: null },
    );

    const toJudge = seriesOfRun(replayed(events));

    // Freezing, boiling, and half way: 0, 100, 50 °C by definition of the scales.
    expect([...(toJudge?.series.tempsC ?? [])]).toEqual([0, 100, 50]);
    expect([...(toJudge?.series.timesS ?? [])]).toEqual([0, 10, 20]);
    expect([...(toJudge?.temps ?? [])]).toEqual([32, 212, 122]);
    expect(toJudge?.marks).toEqual([
      { timeS: 0, kind: 'flame-on' },
      { timeS: 11, kind: 'click' },
    ]);
  });

  test('needs three readings of different moments', () => {
    expect(
      seriesOfRun(replayed(eventsOf(reading(4, 80), reading(4, 81), reading(5, 82)))),
    ).toBeNull();
  });
});

describe('a span by the phone’s clock', () => {
  const asleep = {
    id: 'a',
    runId: 'r',
    n: 2,
    wallMs: 0,
    kind: 'asleep',
    fromS: 100,
    atS: 400,
  } as const;
  const check = (n: number, atS: number, serverMs: number) =>
    ({ id: `c${n}`, runId: 'r', n, wallMs: 0, kind: 'clock-check', atS, serverMs }) as const;
  /** Ended at 500 s of the run, when the phone's clock said 5,000 s; sent 100 s later. */
  const sent = (serverMs: number) => {
    const reached = { serverMs, phoneMs: 5_100_000 };
    const said = { label: 'Run 1', setup: { ...SETUP, duct: 'on', load: 'damp' } } as const;
    return {
      id: 'z',
      runId: 'r',
      n: 9,
      atS: 500,
      wallMs: 5_000_000,
      kind: 'end',
      ...said,
      reached,
    } as const;
  };

  test('agrees where the server counted as much between the checks around it', () => {
    const checks = [check(1, 90, 1_000_000), asleep, check(3, 410, 1_320_500)];

    expect(clockSpans(checks)).toMatchObject([{ fromS: 100, toS: 400, check: 'agrees' }]);
  });

  test('differs where the phone was set ahead by an hour meanwhile', () => {
    const checks = [check(1, 90, 1_000_000), { ...asleep, atS: 4000 }, check(3, 4010, 1_320_000)];

    expect(clockSpans(checks)).toMatchObject([{ check: 'differs', longerS: 3600 }]);
  });

  test('is unchecked while the server was reached on one side only', () => {
    expect(clockSpans([check(1, 90, 1_000_000), asleep])).toMatchObject([{ check: 'unchecked' }]);
  });

  test('is held against both clocks as the run came, where the server was not reached between', () => {
    // The check stands at 90 s; the run came at 500 + 100 = 600 s of its own time: 510 s later.
    const found = [510, 511, 540, 0].map((byServerS) => {
      const events = [check(1, 90, 1_000_000), asleep, sent(1_000_000 + byServerS * 1000)];
      return clockSpans(events)[0];
    });

    expect(found).toMatchObject([
      { check: 'agrees', longerS: 0 },
      { check: 'agrees', longerS: -1 },
      // Half a minute may be the line's.
      { check: 'unchecked', longerS: null },
      { check: 'differs', longerS: 510 },
    ]);
  });

  test('of a run without signal is held against how right the phone’s clock was in the end', () => {
    expect(clockSpans([asleep, sent(5_101_000)])).toMatchObject([
      { check: 'agrees', longerS: null },
    ]);
    expect(clockSpans([asleep, sent(5_400_000)])).toMatchObject([{ check: 'unchecked' }]);
  });
});

test('the guard told event by event says what it says told all at once, also after an undo', () => {
  const climb = Array.from({ length: 20 }, (_, i) => reading(10 * (i + 1), 100 + 5 * i));
  const events = eventsOf(
    ...climb,
    { kind: 'undo', atS: 205, takes: 'e20' },
    { kind: 'correction', atS: 206, of: 'e10', temp: 144 },
    reading(210, 197),
    { kind: 'mark', atS: 212, mark: 'heat-off', text: null },
    reading(220, 199),
  );
  const probe = { accuracyK: 0, calibrationUK: 0, correction: null, responseS: null };
  let soFar = guardOfRun(replayed(events.slice(0, 1)), { rating: null, probe });
  for (let n = 1; n < events.length; n++) {
    soFar = guardAfter(soFar, events[n]!, replayed(events.slice(0, n + 1)));
  }

  expect(soFar).toEqual(guardOfRun(replayed(events), { rating: null, probe }));
  expect(soFar.state.says).not.toBe('quiet');
});

test('ticks stand at multiples of the rhythm, whatever was read or left out', () => {
  expect(beatAt(10, 0)).toEqual({ ticks: 0, toNextS: 10 });
  expect(beatAt(10, 29.5)).toEqual({ ticks: 2, toNextS: 0.5 });
  expect(beatAt(10, 60)).toEqual({ ticks: 6, toNextS: 10 });
  expect([toRhythm(10), toRhythm(null), toRhythm(7)]).toEqual([10, null, undefined]);
});

test('free entry takes a sign, figures and one decimal, and nothing else', () => {
  const typed = (keys: string) => Array.from(keys).reduce(typeOther, '');

  expect(typed('-12.55')).toBe('-12.5');
  expect(typed('1-2..3')).toBe('12.3');
  expect([
    otherValueOf('-12.5'),
    otherValueOf('-'),
    otherValueOf('12.'),
    otherValueOf('-0'),
  ]).toEqual([-12.5, null, null, 0]);
});
