import type { FindingCode, Outcome } from '#shared/analysis/analysis.ts';
import type { Mark } from '#shared/analysis/series.ts';
import { toCelsius } from '#shared/units.ts';
import { ELECTRIC, SOUND, type Faults, type Machine, type Watch } from './machine.ts';
import { createRandom } from './random.ts';
import { simulateRun, type ModelRun } from './simulate-run.ts';
import {
  PROBE,
  takeHandReadings,
  takeProbeReadings,
  type ProbeMethod,
  type Readings,
} from './take-readings.ts';
import { trueTurningPoints } from './true-turning-points.ts';
import { logRows, PLAIN, writeLog, type Layout } from './write-log.ts';

/** What a machine is specified to have, °F, as on the shop's list. */
export type SampleRating = {
  name: string;
  unit: 'F';
  opens: number;
  opensTol: number;
  closes: number;
  closesTol: number;
  overshoot: number;
  undershoot: number;
  highLimit: number;
};

/** A log with all that is true of it. */
export type SampleStory = {
  file: string;
  seed: number;
  story: string;
  fuel: 'electric' | 'gas';
  machine: Machine;
  faults: Faults;
  watch: Watch;
  method: ProbeMethod | 'hand';
  layout: Layout;
  /** The first wall-clock instant, as if in UTC. */
  startedAt: string;
  rating: SampleRating;
  duct: 'on' | 'off';
  load: 'empty' | 'damp';
  /** Clicks that the technician heard: how many of the last ones. */
  clicksHeard: number;
  headline: FindingCode;
  outcome: Outcome;
  probe: { accuracyF: number; responseS: number };
  /** Further cells of a row, after the temperature. */
  beside: (index: number, readings: Readings, marks: Mark[]) => string[];
  /** Changes rows as a disturbed recorder would. */
  disturb: (rows: string[][]) => string[][];
};

export const HL_155_25: SampleRating = {
  name: 'HL-155-25',
  unit: 'F',
  opens: 155,
  opensTol: 5,
  closes: 130,
  closesTol: 5,
  overshoot: 10,
  undershoot: 10,
  highLimit: 196,
};

/** A story with everything that is not worth saying filled in. */
export function story(
  told: Pick<SampleStory, 'file' | 'seed' | 'story' | 'headline' | 'outcome' | 'startedAt'> &
    Partial<Omit<SampleStory, 'machine' | 'faults' | 'watch' | 'method' | 'layout'>> & {
      machine?: Partial<Machine>;
      faults?: Partial<Faults>;
      watch?: Partial<Watch>;
      method?: Partial<ProbeMethod> | 'hand';
      layout?: Partial<Layout>;
    },
): SampleStory {
  return {
    fuel: 'electric',
    rating: HL_155_25,
    duct: 'on',
    load: 'empty',
    clicksHeard: 0,
    probe: { accuracyF: 2, responseS: 3 },
    beside: () => [],
    disturb: (rows) => rows,
    ...told,
    machine: { ...ELECTRIC, ...told.machine },
    // No real disc repeats to the tenth.
    faults: { ...SOUND, scatterK: 0.12, ...told.faults },
    watch: { forS: 900, heatOffAtC: Infinity, afterHeatOffS: 120, ...told.watch },
    method: told.method === 'hand' ? 'hand' : { ...PROBE, ...told.method },
    layout: { ...PLAIN, ...told.layout },
  };
}

/** °F as the model's °C. */
export function fahrenheit(temp: number): number {
  return toCelsius(temp, 'F');
}

/** What make-sample-logs writes: the bytes, and the entry of expected.json. */
export function tellStory(told: SampleStory) {
  const random = createRandom(told.seed);
  const run = simulateRun(told.machine, told.faults, told.watch, random);
  const turns = trueTurningPoints(run, 4 / 1.8);
  const readings =
    told.method === 'hand'
      ? takeHandReadings(run, turns, random)
      : takeProbeReadings(run, told.method, random);
  const marks = marksOf(told, run);
  const rows = logRows(readings, told.layout, {
    startMs: Date.parse(told.startedAt),
    beside: (index) => told.beside(index, readings, marks),
  });
  const bytes = writeLog(told.disturb(rows), told.layout);
  return { bytes, run, turns, readings, marks };
}

function marksOf({ clicksHeard }: SampleStory, run: ModelRun): Mark[] {
  const heard = clicksHeard === 0 ? [] : run.clicksS.slice(-clicksHeard);
  const marks: Mark[] = heard.map((clickS) => ({ timeS: Math.round(clickS), kind: 'click' }));
  if (run.heatOffS !== null) {
    marks.push({ timeS: Math.round(run.heatOffS), kind: 'heat-off', text: 'Heat off by hand' });
  }
  return marks;
}
