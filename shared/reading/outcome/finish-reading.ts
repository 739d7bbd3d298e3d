import { toCelsius, toKelvinStep, type TemperatureUnit } from '../../units.ts';
import type {
  LogChannel,
  LogColumn,
  ReadOptions,
  ReadProblem,
  ReadWarning,
} from '../log-reading.ts';
import { problem } from '../words/problem-words.ts';
import { SKIP_WORDS } from '../words/skip-words.ts';
import { warning } from '../words/warning-words.ts';
import { convertSignals } from '../signals/convert-signals.ts';
import type { QuestionDraft } from './question-draft.ts';
import { RowList, type RowStore } from '../rows/row-store.ts';
import { keepRows } from '../tidy/arrange-rows.ts';
import { chooseChannel } from '../tidy/choose-channel.ts';
import { askScale, isPlausible, scaleDivisor } from '../tidy/choose-scale.ts';
import { askUnit, rangeOf } from '../tidy/choose-unit.ts';
import { findSentinels } from '../tidy/drop-sentinels.ts';

/** 0.2 °F: two roundings to a tenth. */
const TWIN_K = toKelvinStep(0.2, 'F');

/** The run's own readings, chosen, with a unit, and free of what stands for "no reading". */
export type FinishedChannel = {
  place: number;
  unit: TemperatureUnit;
  temps: Float64Array;
  others: LogChannel[];
  sentinels: RowList;
  warnings: ReadWarning[];
};

export type FinishResult =
  | { kind: 'finished'; channel: FinishedChannel }
  | { kind: 'question'; question: QuestionDraft }
  | { kind: 'problem'; problem: ReadProblem };

/** From ordered rows to the run's readings; the store shrinks to the rows that have one. */
export function finishReading(
  store: RowStore,
  columns: LogColumn[],
  hasNames: boolean,
  options: ReadOptions,
): FinishResult {
  const answers = options.answers ?? {};
  const signals = convertSignals(store, columns);
  if (signals.kind === 'question') return signals;
  const choice = chooseChannel(store, columns, options.channel ?? answers.channel, hasNames);
  if (choice.kind === 'question') return choice;
  if (choice.kind === 'unknown') {
    const say = columns.map(({ name }) => name).join(', ');
    return { kind: 'problem', problem: problem('unknown-channel', { value: choice.name, say }) };
  }
  const { place } = choice;
  const column = columns[place]!;
  const own = store.temps[place]!;
  keepRows(store, (i) => !Number.isNaN(own[i]));
  if (store.count === 0) {
    const say = 0;
    return { kind: 'problem', problem: problem('too-few-readings', { column: column.name, say }) };
  }
  const unit = answeredUnit(answers.unit) ?? column.unit;
  if (!unit) return { kind: 'question', question: askUnit(rangeOf(own.subarray(0, store.count))) };
  const sentinels = dropSentinels(store, place, unit);
  const scaled = scale(store, place, column, unit, answers.scale);
  if (scaled.kind !== 'scaled') return scaled;
  const warnings = [...signals.warnings, ...sentinels.warnings, ...scaled.warnings];
  if (choice.others.length > 0) {
    warnings.push(
      warning('channel-chosen', { column: column.name, say: choice.others.join(', ') }),
    );
  }
  warnings.push(...disagreements(store, columns, place));
  const temps = store.temps[place]!.slice(0, store.count);
  const others = otherChannels(store, columns, place, unit);
  return {
    kind: 'finished',
    channel: { place, unit, temps, others, sentinels: sentinels.list, warnings },
  };
}

export function answeredUnit(answer: string | undefined): TemperatureUnit | null {
  return answer === 'F' || answer === 'C' || answer === 'K' ? answer : null;
}

function dropSentinels(store: RowStore, place: number, unit: TemperatureUnit) {
  const list = new RowList();
  const found = findSentinels(store.temps[place]!.subarray(0, store.count), unit);
  const byValue = new Map<number, { row: number; times: number }>();
  const drop = new Set<number>();
  for (const { place: at, value } of found) {
    const row = store.rows[at]!;
    drop.add(at);
    list.add(row, SKIP_WORDS.sentinel(String(value)));
    const known = byValue.get(value);
    if (known) known.times++;
    else byValue.set(value, { row, times: 1 });
  }
  if (drop.size > 0) keepRows(store, (at) => !drop.has(at));
  const warnings = [...byValue].map(([value, { row, times }]) =>
    warning('sentinel-excluded', { row, value: String(value), say: times }),
  );
  return { list, warnings };
}

type Scaled = { kind: 'scaled'; warnings: ReadWarning[] };

/** Readings beyond −60 to 1000 °F are parts of a degree, or raw counts: asked or refused, never used. */
function scale(
  store: RowStore,
  place: number,
  column: LogColumn,
  unit: TemperatureUnit,
  answer: string | undefined,
): Scaled | Exclude<FinishResult, { kind: 'finished' }> {
  const temps = store.temps[place]!.subarray(0, store.count);
  const divisor = scaleDivisor(answer) ?? 1;
  if (divisor > 1) {
    for (let i = 0; i < temps.length; i++) temps[i] = temps[i]! / divisor;
  }
  const { lowest, highest } = rangeOf(temps);
  if (isPlausible(lowest, unit) && isPlausible(highest, unit)) {
    const warnings = divisor > 1 ? [warning('scaled', { say: `${answer} of a degree` })] : [];
    return { kind: 'scaled', warnings };
  }
  const question = answer === undefined ? askScale(temps, lowest, highest, unit) : null;
  if (question) return { kind: 'question', question };
  const at = temps.findIndex((temp) => !isPlausible(temp, unit));
  const where = { row: store.rows[at]!, column: column.name, value: String(temps[at]) };
  return { kind: 'problem', problem: problem('out-of-range', where) };
}

/** The same probe in two units must say the same, but for rounding. */
function disagreements(store: RowStore, columns: LogColumn[], place: number): ReadWarning[] {
  const own = columns[place]!;
  return columns.flatMap((column, other) => {
    const isTwin = column.unit !== own.unit && bareName(column) === bareName(own);
    if (!isTwin || !column.unit || !own.unit) return [];
    for (let i = 0; i < store.count; i++) {
      const a = toCelsius(store.temps[place]![i]!, own.unit);
      const b = toCelsius(store.temps[other]![i]!, column.unit);
      if (Math.abs(a - b) <= TWIN_K || Number.isNaN(b)) continue;
      const say = `${own.name} and ${column.name}`;
      return [warning('channels-disagree', { row: store.rows[i]!, say })];
    }
    return [];
  });
}

function bareName({ name }: LogColumn): string {
  return name
    .replace(/[([]?\s*[°º]?\s*\b[FCK]\b\s*[)\]]?$/i, '')
    .trim()
    .toLowerCase();
}

function otherChannels(
  store: RowStore,
  columns: LogColumn[],
  own: number,
  unit: TemperatureUnit,
): LogChannel[] {
  return columns.flatMap((column, place) => {
    if (place === own) return [];
    const temps = store.temps[place]!.slice(0, store.count);
    return [{ name: column.name, unit: column.unit ?? unit, temps }];
  });
}

/** A series' temperatures in °C. */
export function inCelsius(temps: Float64Array, unit: TemperatureUnit): Float64Array {
  const tempsC = new Float64Array(temps.length);
  for (let i = 0; i < temps.length; i++) tempsC[i] = toCelsius(temps[i]!, unit);
  return tempsC;
}
