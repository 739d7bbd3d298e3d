import { fahrenheit, story, type SampleStory } from './sample-story.ts';

const NEVER_OPENS = fahrenheit(400);

/** Runs in which heat does not stop, or stays away. */
export const FAULTY_STORIES: SampleStory[] = [
  story({
    file: 'runaway-relay-sticks.csv',
    seed: 201,
    story:
      'Three rounds that drift up a little, a click, and the heat keeps coming: the relay sticks. Heat off by hand.',
    startedAt: '2026-04-28T09:30:00Z',
    faults: { relaySticksAfter: 3, relayLateS: 7 },
    watch: { forS: 1500, heatOffAtC: fahrenheit(187), afterHeatOffS: 160 },
    clicksHeard: 4,
    layout: {
      clock: 'm:ss',
      preamble: ['Run of 28 April 2026, Weir Street 14', 'Probe K2 in the centre of the outlet'],
      header: ['Elapsed', 'Exhaust °F'],
    },
    headline: 'runaway',
    outcome: 'stop',
  }),
  story({
    file: 'runaway-from-cold.csv',
    seed: 202,
    story: 'A thermostat that never opens: up from cold with no cut-out. Heat off by hand.',
    startedAt: '2026-04-09T16:00:00Z',
    machine: { disc: { opensC: NEVER_OPENS, closesC: 50, lagS: 6 } },
    watch: { forS: 1500, heatOffAtC: fahrenheit(186), afterHeatOffS: 150 },
    method: { spacingS: 1 },
    layout: {
      clock: 'h:mm:ss',
      delimiter: '\t',
      encoding: 'windows-1252',
      newline: '\r\n',
      header: ['Elapsed', 'Outlet °F'],
    },
    headline: 'runaway',
    outcome: 'stop',
  }),
  story({
    file: 'heat-stays-on-grounded-coil.csv',
    seed: 203,
    story:
      'Two clean rounds, then a hot coil touches its box: half the heat stays on and the exhaust hangs above the reset.',
    startedAt: '2026-04-16T13:45:00Z',
    faults: { groundedW: 2900, groundedAfter: 3 },
    watch: { forS: 960 },
    clicksHeard: 3,
    layout: {
      clock: 'two-columns-iso',
      delimiter: ';',
      header: ['Date', 'Time', 'Exhaust'],
      unitRow: ['', '', '°F'],
    },
    headline: 'heat-stays-on',
    outcome: 'stop',
  }),
  story({
    file: 'heat-lost-fuse-opened.csv',
    seed: 204,
    story:
      'Four clean rounds, then a one-shot part opens on the rise: the exhaust falls to the room and stays there.',
    startedAt: '2026-03-26T10:10:00Z',
    faults: { opensForGoodS: 575 },
    watch: { forS: 1100 },
    method: { spacingS: 2 },
    layout: { clock: 'iso-space', header: ['Time', 'Exhaust °F', 'Room °F'] },
    beside: (index) => [(70.8 + (index % 4) / 10).toFixed(1)],
    headline: 'heat-lost',
    outcome: 'not-proven',
  }),
  story({
    file: 'limit-cycling-crushed-duct.csv',
    seed: 205,
    story:
      'The guest house with its crushed duct: the limit on the heater housing cuts again and again, far below the thermostat.',
    startedAt: '2026-04-17T13:20:00Z',
    machine: { roomC: 21, boxLimit: { opensC: 125, closesC: 84, lagS: 8 } },
    faults: { airflow: [{ fromS: 0, share: 0.25 }] },
    watch: { forS: 780 },
    layout: { clock: 'month-first', header: ['Logged', 'Outlet'], unitInCells: ' °F' },
    headline: 'limit-cycling',
    outcome: 'not-proven',
  }),
  story({
    file: 'below-cut-out-weak-heat.csv',
    seed: 206,
    story:
      'A heater that gives under half its heat: the exhaust levels off well below the cut-out.',
    startedAt: '2026-05-19T09:05:00Z',
    faults: { heaterShare: 0.45 },
    watch: { forS: 1200 },
    method: { spacingS: 5 },
    layout: { clock: 'iso', header: ['Time', 'Exhaust temperature [F]'] },
    headline: 'below-cut-out',
    outcome: 'not-proven',
  }),
  story({
    file: 'no-heat-element-open.csv',
    seed: 207,
    story: 'An open element: ten minutes and hardly any rise.',
    startedAt: '2026-03-31T15:50:00Z',
    faults: { heaterShare: 0.02 },
    watch: { forS: 600 },
    method: { spacingS: 2 },
    layout: { clock: 'iso', preamble: ['Unit: °F', 'Interval: 2 s'], header: ['Time', 'Exhaust'] },
    headline: 'no-heat',
    outcome: 'not-proven',
  }),
  story({
    file: 'hand-timed-runaway.csv',
    seed: 208,
    story:
      'The same fault as runaway-from-cold, read by eye against a stopwatch. Heat off by hand at 187.',
    startedAt: '2026-04-09T16:40:00Z',
    machine: { disc: { opensC: NEVER_OPENS, closesC: 50, lagS: 6 } },
    watch: { forS: 1500, heatOffAtC: fahrenheit(187), afterHeatOffS: 110 },
    method: 'hand',
    layout: { clock: 'm:ss', digits: 0, header: ['Time', 'Exhaust F', 'Note'] },
    beside: (index, readings, marks) => {
      const off = marks.find(({ kind }) => kind === 'heat-off')?.timeS ?? Infinity;
      const before = readings.timesS[index - 1] ?? -1;
      const hit = before < off && (readings.timesS[index] ?? 0) >= off;
      return [hit ? 'heat off' : ''];
    },
    headline: 'runaway',
    outcome: 'stop',
  }),
];
