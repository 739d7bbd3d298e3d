import type { LogColumn } from '../log-reading.ts';
import { exhaustRank } from '../layout/column-roles.ts';
import type { QuestionDraft } from '../outcome/question-draft.ts';
import type { RowStore } from '../rows/row-store.ts';
import { toCelsius, toKelvinStep } from '../../units.ts';

export type ChannelChoice =
  | {
      kind: 'channel';
      place: number;
      /** Names of columns that might be meant as well. */ others: string[];
    }
  | { kind: 'question'; question: QuestionDraft }
  | { kind: 'unknown'; name: string };

/** At most this many readings are looked at. */
const LOOKED_AT = 4_000;
/** A column that swings less than this share of the widest is not the exhaust. */
const ALIKE = 0.5;
/** Without names, every column that moves may be meant. */
const ALIKE_UNNAMED = 0.02;
/** A setting swings by more than this, K, and stands at three values nearly all of the time. */
const SETTING_SWING_K = 3;
const SETTING_SHARE = 0.75;
const SETTING_READINGS = 50;
const SETTING_VALUES = 12;
/** Columns that agree this closely watch the same air, K. */
const SAME_AIR_K = 1.5;

type Behaviour = {
  place: number;
  name: string;
  rank: number;
  readings: number;
  swingK: number;
  /** It stands at a few values and jumps between them: what was set, not what was measured. */
  isSetting: boolean;
};

/**
 * The column that is the run: the one that was asked for, else by name, else by what behaves like an
 * exhaust, that is the one which swings most. Where two are as likely and differ, it is asked.
 *
 * @param columns the temperature columns, in the order of the store's
 */
export function chooseChannel(
  store: RowStore,
  columns: LogColumn[],
  asked: string | undefined,
  hasNames: boolean,
): ChannelChoice {
  if (asked !== undefined) return named(columns, asked);
  const all = columns.map((column, place) => behaviourOf(store, column, place));
  const measured = all.filter(({ readings, isSetting }) => readings >= 3 && !isSetting);
  const alive = measured.length > 0 ? measured : all.filter(({ readings }) => readings >= 3);
  if (alive.length < 2) {
    return { kind: 'channel', place: alive[0]?.place ?? 0, others: [] };
  }
  const bestRank = Math.max(...alive.map(({ rank }) => rank));
  const ranked = alive.filter(({ rank }) => rank === bestRank);
  ranked.sort((a, b) => b.swingK - a.swingK || a.place - b.place);
  const alike = hasNames ? ALIKE : ALIKE_UNNAMED;
  const rivals = ranked.filter(({ swingK }) => swingK >= ranked[0]!.swingK * alike);
  const others = rivals.slice(1).map(({ name }) => name);
  const differs = rivals
    .slice(1)
    .some(({ place }) => !sameAir(store, columns, rivals[0]!.place, place));
  if (differs) return { kind: 'question', question: askChannel(rivals) };
  return { kind: 'channel', place: Math.min(...rivals.map(({ place }) => place)), others };
}

function named(columns: LogColumn[], asked: string): ChannelChoice {
  const exact = columns.findIndex(({ name }) => name === asked);
  const loose = columns.findIndex(({ name }) => fold(name) === fold(asked));
  const place = exact >= 0 ? exact : loose;
  return place >= 0 ? { kind: 'channel', place, others: [] } : { kind: 'unknown', name: asked };
}

function fold(name: string): string {
  return name.trim().toLowerCase();
}

function behaviourOf(store: RowStore, { name, unit }: LogColumn, place: number): Behaviour {
  const temps = store.temps[place]!;
  const stride = Math.max(1, Math.floor(store.count / LOOKED_AT));
  const seen: number[] = [];
  for (let i = 0; i < store.count; i += stride) {
    if (!Number.isNaN(temps[i])) seen.push(temps[i]!);
  }
  const sorted = Float64Array.from(seen).sort();
  const at = (share: number) =>
    sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))] ?? 0;
  const swingK = toKelvinStep(at(0.95) - at(0.05), unit ?? 'C');
  const isSetting = looksSet(seen, swingK);
  return { place, name, rank: exhaustRank(name), readings: seen.length, swingK, isSetting };
}

/** Whether readings stand at few values and jump between them, as a set point or a state does. */
function looksSet(seen: number[], swingK: number): boolean {
  if (swingK <= SETTING_SWING_K || seen.length < SETTING_READINGS) return false;
  const times = new Map<number, number>();
  for (const value of seen) times.set(value, (times.get(value) ?? 0) + 1);
  const commonest = [...times.values()].sort((a, b) => b - a).slice(0, 3);
  if (commonest.reduce((sum, n) => sum + n, 0) > seen.length * SETTING_SHARE) return true;
  const moves = seen.slice(1).flatMap((value, i) => Math.abs(value - seen[i]!) || []);
  const isRare = moves.length < seen.length * 0.02;
  const middle = moves.sort((a, b) => a - b)[moves.length >> 1] ?? 0;
  const grain = moves[0] ?? 0;
  return times.size <= SETTING_VALUES && (isRare || middle >= 2 * grain);
}

/** Root mean square of the difference of two columns is small, each in its own unit. */
function sameAir(store: RowStore, columns: LogColumn[], a: number, b: number): boolean {
  const unitA = columns[a]!.unit ?? columns[b]!.unit ?? 'C';
  const unitB = columns[b]!.unit ?? unitA;
  const stride = Math.max(1, Math.floor(store.count / LOOKED_AT));
  let sum = 0;
  let n = 0;
  for (let i = 0; i < store.count; i += stride) {
    const difference =
      toCelsius(store.temps[a]![i]!, unitA) - toCelsius(store.temps[b]![i]!, unitB);
    if (Number.isNaN(difference)) continue;
    sum += difference * difference;
    n++;
  }
  return n > 0 && Math.sqrt(sum / n) <= SAME_AIR_K;
}

function askChannel(rivals: Behaviour[]): QuestionDraft {
  return {
    about: 'channel',
    message: `${rivals.length} columns swing as an exhaust does. Which one is it?`,
    options: rivals.map(({ name, swingK }) => ({
      answer: name,
      label: `${name}: swings by ${swingK.toFixed(1)} degrees`,
    })),
  };
}
