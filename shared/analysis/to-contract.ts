import type { Analysis, Cycle, Evidence, Leg, Outcome, Point } from './analysis.ts';
import type { TurnsOnly } from './find-turns-only.ts';
import { fromCelsius, fromKelvinStep, type TemperatureUnit } from '../units.ts';

/** What the reader says of a file, as contract 1 prints it. */
export type ReadFacts = {
  timeColumn: string;
  channel: string;
  channelUnit: TemperatureUnit;
  delimiter: string;
  decimal: string;
  skippedRows: { row: number; why: string }[];
  warnings: { code: string; row: number | null; message: string }[];
};

export type ContractPoint = {
  t: number;
  temp: number;
  u: number;
  uTotal: number;
  judged: boolean;
  call: string | null;
  probability: number | null;
  switchT: number | null;
  switchTemp: number | null;
  switchU: number | null;
};

/** The JSON object of contract 1: what is not known is null, never left out. */
export type Contract = {
  contract: 1;
  file: string;
  unit: TemperatureUnit;
  samples: number;
  durationS: number;
  read: ReadFacts & { spikes: number; gaps: number };
  cutOuts: ContractPoint[];
  resets: ContractPoint[];
  cycles: { offS: number; onS: number; swing: number }[];
  legs: ContractLeg[];
  findings: { code: string; from: number; to: number; evidence: Evidence }[];
  outcome: Outcome | null;
  guard: { alarmT: number | null };
  series?: { t: number[]; temp: number[] };
};

export type ContractLeg = {
  kind: string;
  from: number;
  to: number;
  asymptote: number | null;
  asymptoteU: number | null;
  tau: number | null;
  tauU: number | null;
  knee: { t: number; temp: number } | null;
};

export type ContractSource = {
  file: string;
  /** Unit of the output. */
  unit: TemperatureUnit;
  read: ReadFacts;
  analysis: Analysis | TurnsOnly;
  /** Every reading kept, in the output's unit; left out where it was not asked for. Printed as it is. */
  series?: { t: number[]; temp: number[] };
};

/**
 * An analysis as the command prints it: contract 1, in the output's unit. Times are printed to 0.01 s and temperatures
 * to 0.001; the series is not rounded.
 */
export function toContract({ file, unit, read, analysis, series }: ContractSource): Contract {
  const judged = 'findings' in analysis ? analysis : null;
  return {
    contract: 1,
    file,
    unit,
    samples: analysis.samples,
    durationS: time(analysis.durationS),
    read: { ...pickRead(read), spikes: analysis.spikes, gaps: analysis.gaps.length },
    cutOuts: analysis.cutOuts.map((point) => printPoint(point, unit)),
    resets: analysis.resets.map((point) => printPoint(point, unit)),
    cycles: (judged?.cycles ?? []).map((cycle) => printCycle(cycle, unit)),
    legs: (judged?.legs ?? []).map((leg) => printLeg(leg, unit)),
    findings: (judged?.findings ?? []).map(({ code, fromS, toS, evidence }) => ({
      code,
      from: time(fromS),
      to: time(toS),
      evidence: printEvidence(evidence, unit),
    })),
    outcome: judged?.outcome ?? null,
    guard: { alarmT: orNull(judged?.guardAlarmS ?? null, time) },
    ...(series && { series }),
  };
}

/** Only what the contract names, in its order. */
function pickRead(read: ReadFacts): ReadFacts {
  const { timeColumn, channel, channelUnit, delimiter, decimal, skippedRows, warnings } = read;
  return { timeColumn, channel, channelUnit, delimiter, decimal, skippedRows, warnings };
}

function printPoint(point: Point, unit: TemperatureUnit): ContractPoint {
  return {
    t: time(point.timeS),
    temp: temperature(point.tempC, unit),
    u: difference(point.uK, unit),
    uTotal: difference(point.uTotalK, unit),
    judged: point.judged,
    call: point.call,
    probability: orNull(point.probability, (value) => round(value, 6)),
    switchT: orNull(point.switchTimeS, time),
    switchTemp: orNull(point.switchTempC, (tempC) => temperature(tempC, unit)),
    switchU: orNull(point.switchUS, time),
  };
}

function printCycle({ offS, onS, swingK }: Cycle, unit: TemperatureUnit) {
  return { offS: time(offS), onS: time(onS), swing: difference(swingK, unit) };
}

function printLeg(leg: Leg, unit: TemperatureUnit): ContractLeg {
  return {
    kind: leg.kind,
    from: time(leg.fromS),
    to: time(leg.toS),
    asymptote: orNull(leg.asymptoteC, (tempC) => temperature(tempC, unit)),
    asymptoteU: orNull(leg.asymptoteUK, (stepK) => difference(stepK, unit)),
    tau: orNull(leg.tauS, time),
    tauU: orNull(leg.tauUS, time),
    knee: leg.knee && { t: time(leg.knee.timeS), temp: temperature(leg.knee.tempC, unit) },
  };
}

/** Evidence in the output's unit; the ending that said °C, K or K/s goes, that of seconds stays. */
function printEvidence(evidence: Evidence, unit: TemperatureUnit): Evidence {
  const printed: Evidence = {};
  for (const [key, value] of Object.entries(evidence)) {
    const rate = withoutEnding(key, 'KPerS');
    const step = withoutEnding(key, 'K');
    const tempC = withoutEnding(key, 'C');
    if (rate !== null)
      printed[`${rate}PerS`] = convert(value, (v) => round(fromKelvinStep(v, unit), 6));
    else if (step !== null) printed[step] = convert(value, (v) => difference(v, unit));
    else if (tempC !== null) printed[tempC] = convert(value, (v) => temperature(v, unit));
    else printed[key] = convert(value, (v) => round(v, 6));
  }
  return printed;
}

function withoutEnding(key: string, ending: string): string | null {
  return key.length > ending.length && key.endsWith(ending) ? key.slice(0, -ending.length) : null;
}

function convert(value: Evidence[string] | undefined, change: (value: number) => number) {
  return typeof value === 'number' ? finite(change(value)) : (value ?? null);
}

function time(timeS: number): number {
  return round(timeS, 2);
}

function temperature(tempC: number, unit: TemperatureUnit): number {
  return round(fromCelsius(tempC, unit), 3);
}

function difference(stepK: number, unit: TemperatureUnit): number {
  return round(fromKelvinStep(stepK, unit), 3);
}

function orNull(value: number | null, print: (value: number) => number): number | null {
  return value === null ? null : finite(print(value));
}

/** JSON has no infinity: a bound that is not known is null. */
function finite(value: number): number | null {
  return Number.isFinite(value) ? value : null;
}

function round(value: number, digits: number): number {
  const scale = 10 ** digits;
  return Math.round(value * scale) / scale;
}
