import type { BinnedView } from './run-facts.ts';
import type { Series } from './series.ts';

/** No dryer does anything in less; finer readings are averaged, which loses nothing but noise. */
const LEAST_SLOT_S = 0.5;
/** Range of the noise over a plateau, in deviations: what a swing must stand out from. */
const NOISE_RANGE = 6;
/** Smoothing never reaches over more slots than this each side. */
const MOST_REACH = 12;

/**
 * The record in slots of equal width, and a smoothed view of it in which noise cannot make a swing.
 *
 * @param spacingS usual spacing, s
 * @param noiseK standard deviation of a reading, K
 * @param swingK swing that must not drown, K
 */
export function binRecord(
  { timesS, tempsC }: Series,
  spacingS: number,
  noiseK: number,
  swingK: number,
): BinnedView {
  const widthS = Math.max(spacingS, LEAST_SLOT_S);
  const slots = spacingS < LEAST_SLOT_S ? average(timesS, tempsC, widthS) : { timesS, tempsC };
  const perSlot = Math.max(1, timesS.length / Math.max(1, slots.timesS.length));
  const slotNoiseK = noiseK / Math.sqrt(perSlot);
  const needed = ((NOISE_RANGE * slotNoiseK) / Math.max(swingK, 1e-9)) ** 2;
  const reach = Math.min(MOST_REACH, Math.max(0, Math.round((needed - 1) / 2)));
  const smoothC = reach > 0 ? smooth(slots, reach, widthS) : slots.tempsC;
  return { widthS, ...slots, smoothC, smoothNoiseK: slotNoiseK / Math.sqrt(2 * reach + 1) };
}

function average(timesS: Float64Array, tempsC: Float64Array, widthS: number): Series {
  const times = new Float64Array(timesS.length);
  const temps = new Float64Array(timesS.length);
  let slots = 0;
  for (let i = 0; i < timesS.length;) {
    const endS = (Math.floor(timesS[i]! / widthS) + 1) * widthS;
    let sumS = 0;
    let sumC = 0;
    const first = i;
    for (; i < timesS.length && timesS[i]! < endS; i++) {
      sumS += timesS[i]!;
      sumC += tempsC[i]!;
    }
    // Rounding can put the slot's end on its first reading.
    if (i === first) {
      sumS = timesS[i]!;
      sumC = tempsC[i++]!;
    }
    times[slots] = sumS / (i - first);
    temps[slots++] = sumC / (i - first);
  }
  return { timesS: times.slice(0, slots), tempsC: temps.slice(0, slots) };
}

/** Moving average that does not reach over a gap and shrinks at the ends. */
function smooth({ timesS, tempsC }: Series, reach: number, widthS: number): Float64Array {
  const n = tempsC.length;
  const sums = new Float64Array(n + 1);
  for (let i = 0; i < n; i++) sums[i + 1] = sums[i]! + tempsC[i]!;
  const smoothC = new Float64Array(n);
  const farS = (reach + 0.5) * widthS * 1.5;
  for (let i = 0; i < n; i++) {
    let side = Math.min(reach, i, n - 1 - i);
    while (side > 0 && timesS[i + side]! - timesS[i - side]! > 2 * farS) side--;
    smoothC[i] = (sums[i + side + 1]! - sums[i - side]!) / (2 * side + 1);
  }
  return smoothC;
}
