import type { AnalysisInput, Point } from '#shared/analysis/analysis.ts';
import { findPoints } from '#shared/analysis/find-points.ts';
import { findCycles } from '#shared/analysis/find-cycles.ts';
import type { Extreme, RunFacts, RunLeg } from '#shared/analysis/run-facts.ts';
import { toCelsius } from '#shared/units.ts';
import { plainInput } from '../plain-input.ts';

/** A turn as a table would list it: when, at what temperature, °F, and what turned it. */
export type Turn = { timeS: number; tempF: number; turnedBy?: Extreme['turnedBy']; uF?: number };

/**
 * The facts of a run whose turns are known, with straight lines between them: for findings that ask turns, not shapes.
 * The first and last are the record's ends.
 */
export function buildFacts(turns: Turn[], told: Partial<AnalysisInput> = {}): RunFacts {
  const input = plainInput({ roomC: toCelsius(72, 'F'), ...told });
  const extremes = turns.map((turn, i) => toExtreme(turns, turn, i));
  const legs = extremes.slice(1).map((to, i) => toLeg(extremes[i]!, to, i));
  const { cutOuts, resets } = findPoints(extremes, input, true);
  const line = readLines(extremes);
  return {
    input,
    series: line,
    binned: { widthS: 1, ...line, smoothC: line.tempsC, smoothNoiseK: 0 },
    durationS: turns.at(-1)!.timeS,
    ...{ spacingS: 1, spikes: 0, gaps: [], noiseK: 0, roundingK: 0 },
    swingK: input.swingK,
    roomC: input.roomC,
    coldStart: true,
    ...{ extremes, legs, cutOuts, resets },
    cycles: findCycles(extremes),
    probeTooSlow: false,
  };
}

function toExtreme(turns: Turn[], { timeS, tempF, turnedBy, uF = 0.2 }: Turn, i: number): Extreme {
  const beside = turns[i + 1] ?? turns[i - 1]!;
  const ends = i === 0 ? 'start' : i === turns.length - 1 ? 'end' : 'machine';
  return {
    kind: beside.tempF < tempF ? 'peak' : 'valley',
    turnedBy: turnedBy ?? ends,
    timeS,
    tempC: toCelsius(tempF, 'F'),
    uK: uF / 1.8,
    index: timeS,
    switched: null,
  };
}

function toLeg(from: Extreme, to: Extreme, i: number): RunLeg {
  const kind = to.tempC > from.tempC ? 'heating' : 'cooling';
  return { kind, from, to, fit: null, knee: null, fromCold: i === 0, hasGap: false };
}

function readLines(extremes: Extreme[]) {
  const timesS: number[] = [];
  const tempsC: number[] = [];
  for (const [i, to] of extremes.entries()) {
    const from = extremes[i - 1] ?? to;
    for (let timeS = from.timeS; timeS < to.timeS; timeS++) {
      timesS.push(timeS);
      const share = (timeS - from.timeS) / (to.timeS - from.timeS);
      tempsC.push(from.tempC + share * (to.tempC - from.tempC));
    }
  }
  const last = extremes.at(-1)!;
  return {
    timesS: Float64Array.from([...timesS, last.timeS]),
    tempsC: Float64Array.from([...tempsC, last.tempC]),
  };
}

/** Turns from cold through cut-outs and resets at the given temperatures, °F, and some way into the next fall. */
export function turnsAt(cutOutsF: number[], resetF: number, { onS = 90, offS = 45 } = {}): Turn[] {
  const turns: Turn[] = [{ timeS: 0, tempF: 72 }];
  let timeS = 300;
  for (const tempF of cutOutsF) {
    turns.push({ timeS, tempF }, { timeS: timeS + offS, tempF: resetF });
    timeS += onS + offS;
  }
  return [...turns, { timeS: timeS - onS / 2, tempF: resetF + 8 }];
}

/** °F of points, to the tenth. */
export function inF(points: Point[]): number[] {
  return points.map(({ tempC }) => Math.round((tempC * 1.8 + 32) * 10) / 10);
}
