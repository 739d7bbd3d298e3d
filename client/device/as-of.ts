/** Addresses whose last answer came from this device, with when the server gave it. */
export type AsOf = ReturnType<typeof createAsOf>;

export function createAsOf() {
  let times: ReadonlyMap<string, number> = new Map();
  const listeners = new Set<() => void>();

  function show(next: Map<string, number>): void {
    times = next;
    for (const tell of listeners) tell();
  }

  return {
    times: () => times,
    /** `fetchedAtMs` null: the server answered again. */
    set(url: string, fetchedAtMs: number | null): void {
      if ((times.get(url) ?? null) === fetchedAtMs) return;
      const next = new Map(times);
      if (fetchedAtMs === null) next.delete(url);
      else next.set(url, fetchedAtMs);
      show(next);
    },
    subscribe(tell: () => void): () => void {
      listeners.add(tell);
      return () => void listeners.delete(tell);
    },
  };
}

/** Of this page. */
export const asOf = createAsOf();
