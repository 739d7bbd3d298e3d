import { analyseRun } from '#shared/analysis/analyse-run.ts';
import type { Finding } from '#shared/analysis/analysis.ts';
import { fromCelsius } from '#shared/units.ts';
import { matchTurns } from './match-turns.ts';
import type { ReadRun } from './make-runs.ts';
import { trueCodes } from './truth/true-codes.ts';

/**
 * Writes one run out: comments with its truth and what the engine says, then its readings as CSV, so that the whole
 * output can be saved and read as a log.
 */
export function inspectRun({ seed, seen, readings, series, input }: ReadRun): void {
  const { plan, method } = seen;
  const truth = trueCodes(seen);
  const analysis = analyseRun(series, input);
  say(`seed ${seed}, plan "${plan.name}", method "${method.name}"`);
  say(`expected ${truth.expected.join(' ')}; allowed ${truth.allowed.join(' ')}`);
  say(`found ${analysis.findings.map(({ code }) => code).join(' ')}; outcome ${analysis.outcome}`);
  for (const finding of analysis.findings) say(`  ${findingText(finding)}`);
  say(`told: ${JSON.stringify({ ...input, rating: null })}`);
  say(`faults: ${JSON.stringify({ ...plan.faults, airflow: plan.faults.airflow })}`);
  for (const { timeS, changeW, powerW, cause } of seen.run.switches) {
    say(
      `heater ${timeS.toFixed(1)} s: ${changeW.toFixed(0)} W, to ${powerW.toFixed(0)} W by ${cause}`,
    );
  }
  tellTurns(seen, [...analysis.cutOuts, ...analysis.resets]);
  console.log(`Seconds,Exhaust °${readings.unit}`);
  readings.timesS.forEach((timeS, i) => {
    console.log(`${Number(timeS.toFixed(2))},${readings.temps[i] ?? ''}`);
  });
}

function tellTurns(seen: ReadRun['seen'], found: Parameters<typeof matchTurns>[0]): void {
  const { needed, accepted, method } = seen;
  const { pairs } = matchTurns(found, needed, accepted, method.withinS);
  for (const turn of accepted) {
    const point = pairs.find(({ truth }) => truth === turn)?.point;
    const asked = needed.some(({ timeS }) => timeS === turn.timeS) ? 'needed' : 'may be';
    const found = point
      ? `found ${point.timeS.toFixed(1)} s ${inF(point.tempC)} u ${(1.8 * (point.uK ?? 0)).toFixed(2)}, switch ${point.switchTimeS?.toFixed(1) ?? '-'} ± ${point.switchUS?.toFixed(1) ?? '-'}`
      : 'not found';
    say(
      `${turn.kind} ${asked} ${turn.timeS.toFixed(1)} s ${inF(turn.tempC)} switch ${turn.switchTimeS.toFixed(1)}: ${found}`,
    );
  }
  for (const point of found) {
    if (pairs.some((pair) => pair.point === point)) continue;
    say(`${point.kind} invented ${point.timeS.toFixed(1)} s ${inF(point.tempC)}`);
  }
}

function findingText({ code, fromS, toS, evidence }: Finding): string {
  return `${code} ${fromS.toFixed(1)}–${toS.toFixed(1)} s ${JSON.stringify(evidence)}`;
}

function inF(tempC: number): string {
  return `${fromCelsius(tempC, 'F').toFixed(2)} °F`;
}

function say(text: string): void {
  console.log(`# ${text}`);
}
