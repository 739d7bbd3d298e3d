import type { Finding } from '../analysis.ts';
import { fitLine } from '../fit-line.ts';
import { fitResponse } from '../fit-response.ts';
import { bandOf } from '../judge-point.ts';
import type { RunFacts, RunLeg } from '../run-facts.ts';
import { lasted, spanWithTail, totalU } from './trace.ts';

/** Shares of the rise left out of the two fits that must agree: the heater warms first, the drum later. */
const EARLY_SHARE = 0.3;
const LATE_SHARE = 0.55;
/** Readings that a fit of either kind needs beyond the first. */
const LEAST_READINGS = 5;
/** Share of the rise still to come that the model itself may be wrong by. */
const MODEL_SHARE = 0.35;
/** The last part of a rise, as a share of it, whose rate says how far it may still go; it lasts this long, s. */
const LAST_SHARE = 0.6;
const LEAST_LAST_S = 240;
/** Time constant of the slowest part, the drum's metal, s (common practice: a machine is warm through in half an hour). */
const SLOWEST_TAU_S = 600;
/** A rise shorter than this does not show the slowest part, so that its curve alone says too little, s. */
const YOUNG_S = 900;
/** On-times, and s, for which a machine that cut out before may heat again before it is another thing. */
const LONG_TIMES = 3;
const LONG_S = 120;

/**
 * The exhaust levels off under the opens band: no turn came, and the upper bound of where it is heading lies below it.
 *
 * Assumes an empty drum (a damp load holds the exhaust down and is `too-short`) and a rise that ends as a first-order
 * response. A drum is not exactly that, so part of the rise still to come is added to the bound. Where the exhaust has
 * been level for long, no curve is left to fit: then its last rate, at its most, kept up for the slowest time constant
 * (what is left of any sum of first-order rises is no more than that).
 *
 * Evidence: asymptoteC, asymptoteUK, bandLowC, lastC, durationS, cutOutsBefore (of the same run: heat that was lost on
 * the way).
 */
export function findBelowCutOut(facts: RunFacts): Finding | null {
  const { rating, load } = facts.input;
  const leg = facts.legs.at(-1) ?? null;
  const rise = riseOf(leg, facts);
  if (!rating || load === 'damp' || !leg || !rise || !isLong(rise, facts)) return null;
  const { fromS, toS } = spanWithTail(rise, facts);
  const { lowC } = bandOf('cut-out', rating);
  const curve = toS - fromS < YOUNG_S ? null : asymptoteOf(rise, facts);
  const heading = [curve, levelOf(rise, facts)].find(
    (seen) => seen !== null && seen.asymptoteC + seen.uK < lowC,
  );
  if (!heading) return null;
  return {
    code: 'below-cut-out',
    fromS,
    toS,
    evidence: {
      asymptoteC: heading.asymptoteC,
      asymptoteUK: heading.uK,
      bandLowC: lowC,
      lastC: rise.to.tempC,
      durationS: toS - fromS,
      cutOutsBefore: facts.cutOuts.length,
    },
  };
}

/** After cut-outs of its own a machine has lost heat only where it heats for much longer than before. */
function isLong(rise: RunLeg, facts: RunFacts): boolean {
  const { cutOuts, cycles } = facts;
  if (cutOuts.length === 0) return true;
  if (cycles.length === 0) return false;
  const longestS = cycles.reduce((longest, { onS }) => Math.max(longest, onS), 0);
  return lasted(rise, facts) > Math.max(LONG_S, LONG_TIMES * longestS);
}

/** The rise that nobody cut short: the last heating leg, or the one before a fall that a person made. */
function riseOf(last: RunLeg | null, { legs }: RunFacts): RunLeg | null {
  if (!last) return null;
  if (last.kind === 'heating') return last;
  return last.from.turnedBy === 'person' ? (legs.at(-2) ?? null) : null;
}

type Heading = { asymptoteC: number; uK: number };

/** Where a rise that is nearly level may still go: from its end, by its last rate. */
function levelOf(rise: RunLeg, facts: RunFacts): Heading | null {
  const { fromS, toS } = spanWithTail(rise, facts);
  const startS = fromS + LAST_SHARE * (toS - fromS);
  const last = readingsWithin(facts, startS, toS);
  if (!last || toS - startS < LEAST_LAST_S) return null;
  const line = fitLine(last.timesS, last.tempsC);
  const rateKPerS = Math.max(0, line.slopeCPerS);
  const endC = line.interceptC + line.slopeCPerS * toS;
  // A line's end is known twice as badly as its middle.
  const errorK = (2 * Math.max(line.residualSdC, facts.roundingK)) / Math.sqrt(last.timesS.length);
  const leftK = rateKPerS * SLOWEST_TAU_S;
  const leftUK = 2 * line.slopeErrorCPerS * SLOWEST_TAU_S;
  const uK = totalU(facts, { uK: Math.hypot(2 * errorK, leftUK), tempC: endC });
  return { asymptoteC: endC + leftK / 2, uK: leftK / 2 + uK };
}

function readingsWithin({ binned }: RunFacts, fromS: number, toS: number) {
  const { timesS, tempsC } = binned;
  const first = timesS.findIndex((timeS) => timeS >= fromS);
  const last = timesS.findLastIndex((timeS) => timeS <= toS);
  if (first < 0 || last - first < LEAST_READINGS) return null;
  return { timesS: timesS.slice(first, last + 1), tempsC: tempsC.slice(first, last + 1) };
}

/** Two fits, the second of the later part alone; the worse of them counts. */
function asymptoteOf(rise: RunLeg, facts: RunFacts): Heading | null {
  const bounds = [EARLY_SHARE, LATE_SHARE].map((share) => fitFrom(rise, facts, share));
  const [early, late] = bounds;
  if (!early || !late) return null;
  const higher = early.asymptoteC + early.uK > late.asymptoteC + late.uK ? early : late;
  const toComeK = Math.max(0, higher.asymptoteC - rise.to.tempC);
  return { asymptoteC: higher.asymptoteC, uK: higher.uK + MODEL_SHARE * toComeK };
}

function fitFrom(rise: RunLeg, facts: RunFacts, share: number): Heading | null {
  const { fromS, toS } = spanWithTail(rise, facts);
  const part = readingsWithin(facts, fromS + share * (toS - fromS), toS);
  const fit = part && fitResponse(part.timesS, part.tempsC);
  if (!fit) return null;
  const { asymptoteC } = fit;
  return { asymptoteC, uK: totalU(facts, { uK: 2 * fit.asymptoteErrorK, tempC: asymptoteC }) };
}
