import type { AnalysisInput } from '#shared/analysis/analysis.ts';
import { analyseRun } from '#shared/analysis/analyse-run.ts';
import { DEFAULT_RATING } from '#shared/analysis/rating.ts';
import type { Series } from '#shared/analysis/series.ts';
import { toCelsius } from '#shared/units.ts';

/** A first-order stretch: to a temperature in °F, in some seconds, on the way to where it would end, °F. */
export type Stretch = { toF: number; inS: number; headingF: number };

export function heat(toF: number, inS: number, headingF = toF + 35): Stretch {
  return { toF, inS, headingF };
}

export function cool(toF: number, inS: number, headingF = 75): Stretch {
  return { toF, inS, headingF };
}

/** Cut-outs at the given temperatures, °F, each with its reset after it; the first from cold. */
export function cycles(cutOutsF: number[], resetF = 130): Stretch[] {
  return cutOutsF.flatMap((cutOutF, i) => [heat(cutOutF, i === 0 ? 270 : 90), cool(resetF, 45)]);
}

/**
 * Readings of such stretches: every `everyS` from the start of each and one at its end, as a person reads who sees
 * the needle turn; rounded to `stepF`.
 */
export function readRun(stretches: Stretch[], { everyS = 12, stepF = 1, fromF = 72 } = {}): Series {
  const timesS = [0];
  const temps = [fromF];
  let startS = 0;
  let startF = fromF;
  for (const { toF, inS, headingF } of stretches) {
    const tauS = inS / Math.log((headingF - startF) / (headingF - toF));
    for (let sinceS = everyS; sinceS < inS + everyS; sinceS += everyS) {
      const atS = inS - sinceS < everyS / 2 ? inS : sinceS;
      timesS.push(startS + atS);
      temps.push(headingF - (headingF - startF) * Math.exp(-atS / tauS));
      if (atS === inS) break;
    }
    startS += inS;
    startF = toF;
  }
  const rounded = temps.map((temp) => Math.round(temp / stepF) * stepF);
  return {
    timesS: Float64Array.from(timesS),
    tempsC: Float64Array.from(rounded, (temp) => toCelsius(temp, 'F')),
  };
}

/** Judged as the command would by default: a probe without error, an empty drum, a room of 72 °F. */
export function judge(series: Series, told: Partial<AnalysisInput> = {}) {
  return analyseRun(series, {
    rating: DEFAULT_RATING,
    probe: { accuracyK: 0, calibrationUK: 0, correction: null, responseS: null },
    marks: [],
    load: 'empty',
    roomC: toCelsius(72, 'F'),
    minCycles: 3,
    swingK: 4 / 1.8,
    reference: null,
    ...told,
  });
}

export function codesOf(analysis: ReturnType<typeof judge>): string[] {
  return analysis.findings.map(({ code }) => code);
}
