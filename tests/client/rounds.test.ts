import { expect, test } from 'vitest';
import type { RoundsItem } from '#shared/schemas/jobs.ts';
import type { RunCard } from '#shared/schemas/runs.ts';
import { dayHeading, stepDay } from '#client/pages/rounds/day-step.ts';
import {
  byTechnician,
  countVisits,
  nextVisit,
  opensWords,
  runsWords,
} from '#client/pages/rounds/rounds-words.ts';

const MINUTE_MS = 60_000;
const HOUR_MS = 60 * MINUTE_MS;
const EIGHT_MS = Date.UTC(2026, 2, 4, 8);

const id = '0b7c0f5e-8f0a-4c8e-9a61-0f4f6d6b2a11';

function visitAt(startsAtMs: number, technician = 'Tom Birkett', state = 'booked' as const) {
  const visit: RoundsItem = {
    id,
    jobId: id,
    technician: { id: technician, name: technician },
    startsAtMs,
    endsAtMs: startsAtMs + HOUR_MS,
    safetyTickedAtMs: null,
    notes: '',
    notesVersion: '',
    notesEdited: null,
    before: null,
    runs: [],
    job: {
      id,
      number: 1184,
      complaint: 'No heat since Sunday.',
      state,
      takenAtMs: 0,
      callsBack: null,
      customer: { id, name: 'Dele Okafor', phone: '', email: '', notes: '' },
      home: { id, customerId: id, address: '51 Station Road', town: '', accessNotes: '' },
      machine: {
        id,
        homeId: id,
        make: 'Calder',
        model: '',
        serial: '',
        fuel: 'electric',
        control: 'thermostat',
        ratedVolts: null,
        ratedWatts: null,
        place: '',
      },
    },
  };
  return visit;
}

function runAt(startedAtMs: number, outcome: RunCard['outcome'], calls: RunCard['calls']): RunCard {
  return {
    id,
    visitId: id,
    label: 'Run',
    startedAtMs,
    samples: 3,
    durationS: 900,
    outcome,
    headline: 'in-band',
    calls,
    trace: [],
    bands: null,
  };
}

test('a day steps over the ends of months and years, whatever the clocks do', () => {
  expect(stepDay('2026-02-28', 1)).toBe('2026-03-01');
  expect(stepDay('2028-02-28', 1)).toBe('2028-02-29');
  expect(stepDay('2026-01-01', -1)).toBe('2025-12-31');
  // Clocks change in New York on 2026-03-08.
  expect(stepDay('2026-03-08', 1)).toBe('2026-03-09');
});

test('a day is named with its weekday, and with its year only in another one', () => {
  expect(dayHeading('2026-04-28', '2026-04-28')).toBe('Tuesday 28 April');
  expect(dayHeading('2025-12-31', '2026-01-01')).toBe('Wednesday 31 December 2025');
});

test('the next visit is the first that is neither over nor done with', () => {
  const [first, second, third] = [0, 2, 4].map((hours) => visitAt(EIGHT_MS + hours * HOUR_MS));
  if (!first || !second || !third) throw new RangeError('three visits');
  const done: RoundsItem = { ...second, job: { ...second.job, state: 'fixed' } };

  expect(nextVisit([first, second, third], EIGHT_MS + HOUR_MS / 2)).toBe(first);
  expect(nextVisit([first, second, third], EIGHT_MS + HOUR_MS)).toBe(second);
  expect(nextVisit([first, done, third], EIGHT_MS + HOUR_MS)).toBe(third);
  expect(nextVisit([first, second, third], EIGHT_MS + 9 * HOUR_MS)).toBeNull();
});

test('how soon the next visit opens is told in minutes, then in hours', () => {
  const visit = visitAt(EIGHT_MS);

  expect(opensWords(visit, EIGHT_MS - 20 * MINUTE_MS)).toBe('the next opens in 20\u00a0min');
  expect(opensWords(visit, EIGHT_MS - 3 * HOUR_MS)).toBe('the next opens in 3\u00a0h');
  expect(opensWords(visit, EIGHT_MS + MINUTE_MS)).toBe('the next is open now');
});

test('the runs of a visit are told by the one that was made last', () => {
  const early = runAt(1000, 'stop', ['outside']);
  const late = runAt(2000, 'proven', ['inside', 'inside', 'too-close']);

  expect(runsWords([])).toBeNull();
  expect(runsWords([early])).toBe('1 run: stop, 0 of 1 inside');
  expect(runsWords([late, early])).toBe('2 runs, the last: proven, 2 of 3 inside');
});

test('the office sees visits by technician, each in the order of the day', () => {
  const visits = [
    visitAt(EIGHT_MS, 'Tom Birkett'),
    visitAt(EIGHT_MS + HOUR_MS, 'Ada Quill'),
    visitAt(EIGHT_MS + 2 * HOUR_MS, 'Tom Birkett'),
  ];

  const groups = byTechnician(visits);

  expect(groups.map(({ name }) => name)).toEqual(['Tom Birkett', 'Ada Quill']);
  expect(groups[0]?.visits).toEqual([visits[0], visits[2]]);
});

test('visits are counted in words', () => {
  expect([0, 1, 5].map(countVisits)).toEqual(['No visits', '1 visit', '5 visits']);
});
