import { fahrenheit, story, type SampleStory } from './sample-story.ts';
import type { Disc } from './machine.ts';

function disc(opens: number, closes: number): Disc {
  return { opensC: fahrenheit(opens), closesC: fahrenheit(closes), lagS: 6 };
}

/** Runs that cycle by themselves, at the wrong temperature or at no steady one. */
export const OUT_OF_BAND_STORIES: SampleStory[] = [
  story({
    file: 'opens-high-wrong-thermostat-a.csv',
    seed: 301,
    story:
      'Clean rounds, twenty degrees too hot: a thermostat of another rating from a mixed box. First home.',
    startedAt: '2026-05-14T10:00:00Z',
    machine: { disc: disc(174.6, 150) },
    watch: { forS: 1150 },
    layout: { clock: 'seconds', header: ['Seconds', 'Exhaust °F'] },
    headline: 'opens-high',
    outcome: 'not-proven',
  }),
  story({
    file: 'opens-high-wrong-thermostat-b.csv',
    seed: 302,
    story: 'The same lot in a second home, logged in °C.',
    startedAt: '2026-05-21T16:30:00Z',
    machine: { roomC: 24, disc: disc(175.6, 151) },
    watch: { forS: 1100 },
    method: { spacingS: 2, unit: 'C' },
    layout: { clock: 'day-first-slashes', header: ['Logged at', 'Exhaust °C'] },
    headline: 'opens-high',
    outcome: 'not-proven',
  }),
  story({
    file: 'opens-high-wrong-thermostat-c.csv',
    seed: 303,
    story: 'The same lot in a third home.',
    startedAt: '2026-05-26T08:45:00Z',
    machine: { roomC: 19, powerW: 5400, disc: disc(173.9, 149.5) },
    watch: { forS: 1400 },
    method: { spacingS: 2 },
    layout: { clock: 'iso-zulu', quoted: true, header: ['time', 'vent_temp_f'] },
    headline: 'opens-high',
    outcome: 'not-proven',
  }),
  story({
    file: 'opens-low-aged-disc.csv',
    seed: 304,
    story: 'An aged disc that opens early: short rounds, slow drying.',
    startedAt: '2026-04-02T14:15:00Z',
    machine: { disc: disc(141.5, 126) },
    watch: { forS: 600 },
    method: { spacingS: 0.5 },
    layout: { clock: 'seconds', header: ['Elapsed (s)', 'Exhaust (F)'] },
    headline: 'opens-low',
    outcome: 'not-proven',
  }),
  story({
    file: 'closes-high-wrong-differential.csv',
    seed: 305,
    story:
      'Opens where it is to, comes back fifteen degrees too early: a part with a narrower differential.',
    startedAt: '2026-05-04T11:30:00Z',
    machine: { disc: disc(153.8, 146) },
    watch: { forS: 720 },
    method: { unit: 'C' },
    layout: {
      clock: 'h:mm:ss',
      delimiter: ';',
      decimal: ',',
      header: ['Laufzeit', 'Temperatur (°C)'],
    },
    headline: 'closes-high',
    outcome: 'not-proven',
  }),
  story({
    file: 'closes-low-wide-differential.csv',
    seed: 306,
    story: 'Opens where it is to, comes back far too late: a part with a wider differential.',
    startedAt: '2026-05-18T12:20:00Z',
    machine: { disc: disc(154.2, 110) },
    watch: { forS: 1200 },
    method: { spacingS: 2 },
    layout: { clock: 'two-columns-month-first', header: ['Date', 'Time', 'Exhaust °F'] },
    headline: 'closes-low',
    outcome: 'not-proven',
  }),
  story({
    file: 'drifting-cut-outs.csv',
    seed: 307,
    story: 'Each cut-out comes a little higher than the one before.',
    startedAt: '2026-04-30T15:00:00Z',
    machine: { disc: disc(149.5, 131) },
    faults: { driftK: 0.95 },
    watch: { forS: 1150 },
    method: { spacingS: 2 },
    layout: {
      clock: 'iso-space',
      delimiter: '\t',
      encoding: 'utf-16le',
      newline: '\r\n',
      header: ['Time', 'Exhaust °F'],
    },
    headline: 'drifting',
    outcome: 'not-proven',
  }),
  story({
    file: 'scattered-loose-terminal.csv',
    seed: 311,
    story: 'A loose terminal: cut-outs come early and late with no order. The run passes midnight.',
    startedAt: '2026-05-11T23:51:00Z',
    faults: { scatterK: 4.2 },
    watch: { forS: 1200 },
    layout: { clock: 'time-of-day', header: ['Clock', 'Exhaust °F'] },
    headline: 'scattered',
    outcome: 'not-proven',
  }),
  story({
    file: 'mixed-one-outside.csv',
    seed: 309,
    story:
      'Three judged rounds, one of them far too hot, in a log with open-sensor words, a pause, and stamps out of order and twice.',
    startedAt: '2026-05-13T09:00:00Z',
    faults: { oneLate: { opening: 2, byK: 10.5 } },
    watch: { forS: 760 },
    method: { gaps: [{ fromS: 318, toS: 331 }] },
    layout: { clock: 'iso', header: ['Time', 'Exhaust °F'] },
    disturb: disturbRows,
    headline: 'mixed',
    outcome: 'not-proven',
  }),
];

/** Open-sensor words on the rise, two rows swapped, and one written twice. */
function disturbRows(rows: string[][]): string[][] {
  const disturbed = rows.map((row, i) => (i >= 90 && i < 94 ? [row[0] ?? '', 'OPEN'] : row));
  const [first, second] = disturbed.slice(140, 142);
  if (first && second) disturbed.splice(140, 2, second, first);
  const twice = disturbed[200];
  if (twice) disturbed.splice(201, 0, twice);
  return disturbed;
}
