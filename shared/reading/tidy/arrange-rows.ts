import type { RowStore } from '../rows/row-store.ts';

/** Turns the rows of a store round. */
export function reverseRows(store: RowStore): void {
  const { count } = store;
  store.ticks.subarray(0, count).reverse();
  store.rows.subarray(0, count).reverse();
  for (const temps of store.temps) temps.subarray(0, count).reverse();
}

/** Row i becomes what row order[i] was; `order` may be shorter than the store, which then shrinks. */
export function permuteRows(store: RowStore, order: Uint32Array): void {
  store.ticks = taken(store.ticks, order, new Float64Array(order.length));
  store.rows = taken(store.rows, order, new Int32Array(order.length));
  store.temps = store.temps.map((temps) => taken(temps, order, new Float64Array(order.length)));
  store.count = order.length;
}

/** Keeps the rows whose place is marked, in their order, in place. */
export function keepRows(store: RowStore, isKept: (place: number) => boolean): void {
  const { ticks, rows, temps, count } = store;
  let to = 0;
  for (let i = 0; i < count; i++) {
    if (!isKept(i)) continue;
    ticks[to] = ticks[i]!;
    rows[to] = rows[i]!;
    for (const column of temps) column[to] = column[i]!;
    to++;
  }
  store.count = to;
}

function taken<T extends Float64Array | Int32Array>(from: T, order: Uint32Array, to: T): T {
  for (let i = 0; i < order.length; i++) to[i] = from[order[i]!]!;
  return to;
}

/** Median of the positive steps between rows, µs, from at most some 20,000 of them; 0 for none. */
export function medianStepTicks({ ticks, count }: RowStore): number {
  const stride = Math.max(1, Math.floor(count / 20_000));
  const steps: number[] = [];
  for (let i = stride; i < count; i += stride) {
    const step = ticks[i]! - ticks[i - 1]!;
    if (step > 0) steps.push(step);
  }
  const sorted = Float64Array.from(steps).sort();
  return sorted[sorted.length >> 1] ?? 0;
}
