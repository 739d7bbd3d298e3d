import { parseArgs } from 'node:util';
import { DEFAULT_RATING, type Load, type Probe, type Rating } from '#shared/analysis/rating.ts';
import { QUESTION_SUBJECTS, type Answers } from '#shared/reading/log-reading.ts';
import { toCelsius, toKelvinStep, type DisplayUnit } from '#shared/units.ts';

/** What the analyse command was told, in °C, K and s. */
export type AnalyseFlags = {
  unit: DisplayUnit;
  rating: Rating;
  swingK: number;
  probe: Probe;
  roomC: number | null;
  load: Load | null;
  minCycles: number;
  channel: string | null;
  marksFile: string | null;
  turnsOnly: boolean;
  withSeries: boolean;
  answers: Answers;
  files: string[];
};

/** The flags are wrong; the message says which and how. */
export class FlagError extends Error {}

const OPTIONS = {
  opens: { type: 'string' },
  'opens-tol': { type: 'string' },
  closes: { type: 'string' },
  'closes-tol': { type: 'string' },
  overshoot: { type: 'string' },
  undershoot: { type: 'string' },
  'high-limit': { type: 'string' },
  unit: { type: 'string' },
  swing: { type: 'string' },
  'probe-accuracy': { type: 'string' },
  'probe-tau': { type: 'string' },
  room: { type: 'string' },
  load: { type: 'string' },
  'min-cycles': { type: 'string' },
  channel: { type: 'string' },
  marks: { type: 'string' },
  'turning-points-only': { type: 'boolean' },
  series: { type: 'boolean' },
  assume: { type: 'string', multiple: true },
} as const;

/** The ceiling lies this far under the high limit where none is told (common practice). */
const CEILING_UNDER_K = toKelvinStep(6, 'F');
const DEFAULT_SWING_K = toKelvinStep(4, 'F');

type Values = Partial<Record<keyof typeof OPTIONS, string | boolean | string[]>>;

/**
 * @param args the words after the command's name
 * @throws {FlagError} a flag is unknown, has no number where one belongs, or no file is named
 */
export function parseFlags(args: string[]): AnalyseFlags {
  const { values, files } = split(args);
  const unit = oneOf(values, 'unit', ['F', 'C'] as const) ?? 'F';
  const read = numbersIn(values, unit);
  const highLimitC = read.temp('high-limit', DEFAULT_RATING.highLimitC);
  const rating: Rating = {
    opensC: read.temp('opens', DEFAULT_RATING.opensC),
    opensTolK: read.step('opens-tol', DEFAULT_RATING.opensTolK),
    closesC: read.temp('closes', DEFAULT_RATING.closesC),
    closesTolK: read.step('closes-tol', DEFAULT_RATING.closesTolK),
    overshootK: read.step('overshoot', DEFAULT_RATING.overshootK),
    undershootK: read.step('undershoot', DEFAULT_RATING.undershootK),
    highLimitC,
    ceilingC: highLimitC - CEILING_UNDER_K,
  };
  if (rating.opensC <= rating.closesC) throw new FlagError('--opens must lie above --closes');
  return {
    unit,
    rating,
    swingK: positive('swing', read.step('swing', DEFAULT_SWING_K)),
    probe: {
      accuracyK: read.step('probe-accuracy', 0),
      calibrationUK: 0,
      correction: null,
      responseS: read.number('probe-tau', null),
    },
    roomC: values.room === undefined ? null : read.temp('room', 0),
    load: oneOf(values, 'load', ['empty', 'damp'] as const),
    minCycles: wholeCycles(read.number('min-cycles', 3)),
    channel: text(values, 'channel'),
    marksFile: text(values, 'marks'),
    turnsOnly: values['turning-points-only'] === true,
    withSeries: values.series === true,
    answers: parseAnswers(values.assume),
    files,
  };
}

function split(args: string[]): { values: Values; files: string[] } {
  try {
    const { values, positionals } = parseArgs({
      args: joinNegatives(args),
      options: OPTIONS,
      allowPositionals: true,
    });
    if (positionals.length === 0) throw new FlagError('no file is named');
    return { values, files: positionals };
  } catch (error) {
    if (error instanceof FlagError) throw error;
    throw new FlagError(error instanceof Error ? error.message : String(error));
  }
}

/** "--room -5" is a flag and its number, not two flags. */
function joinNegatives(args: string[]): string[] {
  const joined: string[] = [];
  for (const arg of args) {
    const before = joined.at(-1);
    const isNumber = /^-(\d|\.\d)/.test(arg);
    if (isNumber && before !== undefined && /^--[a-z-]+$/.test(before)) {
      joined[joined.length - 1] = `${before}=${arg}`;
    } else {
      joined.push(arg);
    }
  }
  return joined;
}

function text(values: Values, name: keyof typeof OPTIONS): string | null {
  const value = values[name];
  return typeof value === 'string' ? value : null;
}

function oneOf<T extends string>(
  values: Values,
  name: keyof typeof OPTIONS,
  allowed: readonly T[],
) {
  const value = text(values, name);
  if (value === null) return null;
  const found = allowed.find((word) => word.toLowerCase() === value.toLowerCase());
  if (found === undefined) throw new FlagError(`--${name} must be ${allowed.join(' or ')}`);
  return found;
}

/** Flags as °C, K or s; a default is kept exactly, and is not read in the flags' unit. */
function numbersIn(values: Values, unit: DisplayUnit) {
  function number<T>(name: keyof typeof OPTIONS, otherwise: T): number | T {
    const value = text(values, name);
    if (value === null) return otherwise;
    const parsed = Number(value);
    if (value.trim() === '' || !Number.isFinite(parsed)) {
      throw new FlagError(`--${name} needs a number, not "${value}"`);
    }
    return parsed;
  }
  return {
    number,
    temp(name: keyof typeof OPTIONS, otherwiseC: number): number {
      const temp = number(name, null);
      return temp === null ? otherwiseC : toCelsius(temp, unit);
    },
    step(name: keyof typeof OPTIONS, otherwiseK: number): number {
      const step = number(name, null);
      if (step !== null && step < 0) throw new FlagError(`--${name} must not be below 0`);
      return step === null ? otherwiseK : toKelvinStep(step, unit);
    },
  };
}

function positive(name: string, value: number): number {
  if (value <= 0) throw new FlagError(`--${name} must be above 0`);
  return value;
}

function wholeCycles(cycles: number): number {
  if (!Number.isInteger(cycles) || cycles < 1) {
    throw new FlagError('--min-cycles needs a whole number from 1');
  }
  return cycles;
}

function parseAnswers(given: Values['assume']): Answers {
  const answers: Answers = {};
  for (const pair of Array.isArray(given) ? given : []) {
    const [about, answer] = [pair.slice(0, pair.indexOf('=')), pair.slice(pair.indexOf('=') + 1)];
    const subject = QUESTION_SUBJECTS.find((known) => known === about);
    if (!pair.includes('=') || !subject || answer === '') {
      throw new FlagError(
        `--assume needs ABOUT=ANSWER, with ABOUT one of ${QUESTION_SUBJECTS.join(', ')}`,
      );
    }
    answers[subject] = answer;
  }
  return answers;
}
