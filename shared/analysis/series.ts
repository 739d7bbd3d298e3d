/** Readings of one probe: the one shape that everything in `analysis` works on. */
export type Series = {
  /** Seconds from the first reading, finite and strictly rising. */
  timesS: Float64Array;
  /** °C at the probe, finite, same length. */
  tempsC: Float64Array;
};

/** What a technician saw or heard during a run. */
export type MarkKind =
  'click' | 'heat-off' | 'heat-on' | 'flame-on' | 'stopped' | 'door' | 'duct-off' | 'note';

export type Mark = { timeS: number; kind: MarkKind; text?: string };

/**
 * The one shape check of `analysis`.
 *
 * @throws {RangeError} lengths differ, a value is not finite, or times do not rise
 */
export function assertSeries({ timesS, tempsC }: Series): void {
  const n = timesS.length;
  if (tempsC.length !== n) throw new RangeError(`${n} times but ${tempsC.length} temperatures`);
  let before = -Infinity;
  for (let i = 0; i < n; i++) {
    const timeS = timesS[i]!;
    if (!Number.isFinite(timeS) || !Number.isFinite(tempsC[i]!)) {
      throw new RangeError(`reading ${i} is not finite`);
    }
    if (timeS <= before) throw new RangeError(`time does not rise at reading ${i}`);
    before = timeS;
  }
}
