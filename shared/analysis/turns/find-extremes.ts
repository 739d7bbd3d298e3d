/** An extreme of the binned view, before it is located. */
export type RoughExtreme = { kind: 'peak' | 'valley'; slot: number; tempC: number };

/**
 * Local extremes that stand out by a threshold on both sides (zig-zag with hysteresis), in one pass.
 *
 * @param tempsC smoothed temperatures, °C
 * @param thresholdK least swing, K
 * @returns alternating extremes; the first and the last belong to the record's ends, where one swing is missing.
 *   Empty where nothing swings as far as the threshold.
 */
export function findExtremes(tempsC: Float64Array, thresholdK: number): RoughExtreme[] {
  const found: RoughExtreme[] = [];
  let low = 0;
  let high = 0;
  let rising: boolean | null = null;
  for (let slot = 1; slot < tempsC.length; slot++) {
    const tempC = tempsC[slot]!;
    if (rising !== false && tempC > tempsC[high]!) high = slot;
    if (rising !== true && tempC < tempsC[low]!) low = slot;
    if (rising !== true && tempC - tempsC[low]! >= thresholdK) {
      found.push({ kind: 'valley', slot: low, tempC: tempsC[low]! });
      rising = true;
      high = slot;
    } else if (rising !== false && tempsC[high]! - tempC >= thresholdK) {
      found.push({ kind: 'peak', slot: high, tempC: tempsC[high]! });
      rising = false;
      low = slot;
    }
  }
  if (rising === true) found.push({ kind: 'peak', slot: high, tempC: tempsC[high]! });
  if (rising === false) found.push({ kind: 'valley', slot: low, tempC: tempsC[low]! });
  return found;
}
