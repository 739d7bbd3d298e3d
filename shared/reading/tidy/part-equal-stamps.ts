import { TICKS_PER_S } from '../clock/parse-stamp.ts';
import type { ReadWarning } from '../log-reading.ts';
import { SKIP_WORDS } from '../words/skip-words.ts';
import { warning } from '../words/warning-words.ts';
import type { RowStore } from '../rows/row-store.ts';
import { keepRows } from './arrange-rows.ts';

/** Grains that stamps come in, coarse to fine, µs. */
const GRAINS = [60 * TICKS_PER_S, TICKS_PER_S, 1e5, 1e4, 1e3, 100, 10, 1];
/** A repeated stamp is an exception where no more rows than this share have one. */
const EXCEPTION = 0.1;

type Group = { from: number; to: number };

/**
 * Rows with the same stamp, times being in order. Under a coarse stamp they are readings, and are spread
 * evenly over what the stamp covers; where stamps are finer than the step, rows alike in all are one
 * reading written twice.
 */
export function partEqualStamps(store: RowStore): ReadWarning[] {
  const groups = groupsOf(store);
  if (groups.length === store.count) return [];
  const grain = grainOf(store);
  const isFine = stampsAreFine(store, groups, grain);
  const usual = usualSize(groups);
  const drop = new Uint8Array(store.count);
  let spread = 0;
  for (const [k, group] of groups.entries()) {
    if (group.to - group.from === 1) continue;
    const next = groups[k + 1];
    const widthTicks = next
      ? Math.min(grain, store.ticks[next.from]! - store.ticks[group.from]!)
      : grain;
    if (isFine) markRepeats(store, group, drop);
    if (isFine && drop.subarray(group.from, group.to).includes(1) && kept(group, drop) === 1)
      continue;
    spread++;
    spreadGroup(store, group, drop, { widthTicks, usual, isFirst: k === 0, isLast: !next });
  }
  return finish(store, drop, spread, grain);
}

function finish(store: RowStore, drop: Uint8Array, spread: number, grain: number): ReadWarning[] {
  const warnings: ReadWarning[] = [];
  const first = drop.indexOf(1);
  if (first >= 0) {
    let say = 0;
    for (let i = first; i < store.count; i++) {
      if (drop[i] === 0) continue;
      say++;
      store.passedOver.add(store.rows[i]!, SKIP_WORDS.repeated());
    }
    warnings.push(warning('duplicates-dropped', { row: store.rows[first]!, say }));
    keepRows(store, (place) => drop[place] === 0);
  }
  if (spread > 0) {
    const say = grain >= 60 * TICKS_PER_S ? 'the minute' : `${grain / TICKS_PER_S} s`;
    warnings.push(warning('spread-in-stamp', { say }));
  }
  return warnings;
}

function groupsOf({ ticks, count }: RowStore): Group[] {
  const groups: Group[] = [];
  let from = 0;
  for (let i = 1; i <= count; i++) {
    if (i < count && ticks[i] === ticks[from]) continue;
    groups.push({ from, to: i });
    from = i;
  }
  return groups;
}

/** The coarsest grain that every stamp is a multiple of. */
function grainOf({ ticks, count }: RowStore): number {
  return (
    GRAINS.find((grain) => {
      for (let i = 0; i < count; i++) {
        if (ticks[i]! % grain !== 0) return false;
      }
      return true;
    }) ?? 1
  );
}

function stampsAreFine(store: RowStore, groups: Group[], grain: number): boolean {
  if (store.count - groups.length <= store.count * EXCEPTION) return true;
  const steps = groups
    .slice(1)
    .map(({ from }, k) => store.ticks[from]! - store.ticks[groups[k]!.from]!);
  steps.sort((a, b) => a - b);
  return (steps[steps.length >> 1] ?? 0) >= 2 * grain;
}

/** Median size of the groups that are whole, that is neither the first nor the last. */
function usualSize(groups: Group[]): number {
  const inner = groups.length > 2 ? groups.slice(1, -1) : groups;
  const sizes = inner.map(({ from, to }) => to - from).sort((a, b) => a - b);
  return sizes[sizes.length >> 1] ?? 1;
}

function markRepeats({ temps }: RowStore, { from, to }: Group, drop: Uint8Array): void {
  for (let i = from + 1; i < to; i++) {
    const isRepeat = temps.every((column) => Object.is(column[i], column[i - 1]));
    if (isRepeat) drop[i] = 1;
  }
}

function kept({ from, to }: Group, drop: Uint8Array): number {
  let n = 0;
  for (let i = from; i < to; i++) if (drop[i] === 0) n++;
  return n;
}

type Spread = { widthTicks: number; usual: number; isFirst: boolean; isLast: boolean };

/** A first group that is short began late within its stamp; a last one ended early. */
function spreadGroup({ ticks }: RowStore, group: Group, drop: Uint8Array, how: Spread): void {
  const n = kept(group, drop);
  const isShort = n < how.usual && (how.isFirst || how.isLast);
  const stepTicks = how.widthTicks / (isShort ? how.usual : n);
  const startTicks =
    ticks[group.from]! + (isShort && how.isFirst ? (how.usual - n) * stepTicks : 0);
  let k = 0;
  for (let i = group.from; i < group.to; i++) {
    if (drop[i] === 0) ticks[i] = startTicks + k++ * stepTicks;
  }
}
