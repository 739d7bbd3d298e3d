import type { Finding } from '../analysis.ts';
import { fitResponse } from '../fit-response.ts';
import { bandOf } from '../judge-point.ts';
import type { RunFacts, RunLeg } from '../run-facts.ts';
import { lasted, spanWithTail, totalU } from './trace.ts';

/** Shares of the rise left out of the two fits that must agree: the heater warms first, the drum later. */
const EARLY_SHARE = 0.3;
const LATE_SHARE = 0.55;
/** Share of the rise still to come that the model itself may be wrong by. */
const MODEL_SHARE = 0.35;
/** On-times, and s, for which a machine that cut out before may heat again before it is another thing. */
const LONG_TIMES = 3;
const LONG_S = 120;

/**
 * The exhaust levels off under the opens band: no turn came, and the upper bound of where it is heading lies below it.
 *
 * Assumes an empty drum (a damp load holds the exhaust down and is `too-short`) and a rise that ends as a first-order
 * response. A drum is not exactly that, so part of the rise still to come is added to the bound.
 *
 * Evidence: asymptoteC, asymptoteUK, bandLowC, lastC, durationS, cutOutsBefore (of the same run: heat that was lost on
 * the way).
 */
export function findBelowCutOut(facts: RunFacts): Finding | null {
  const { rating, load } = facts.input;
  const leg = facts.legs.at(-1) ?? null;
  const rise = riseOf(leg, facts);
  if (!rating || load === 'damp' || !leg || !rise || !isLong(rise, facts)) return null;
  const heading = asymptoteOf(rise, facts);
  if (!heading) return null;
  const { fromS, toS } = spanWithTail(rise, facts);
  const { lowC } = bandOf('cut-out', rating);
  if (heading.asymptoteC + heading.uK >= lowC) return null;
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

/** Two fits, the second of the later part alone; the worse of them counts. */
function asymptoteOf(rise: RunLeg, facts: RunFacts): { asymptoteC: number; uK: number } | null {
  const bounds = [EARLY_SHARE, LATE_SHARE].map((share) => fitFrom(rise, facts, share));
  const [early, late] = bounds;
  if (!early || !late) return null;
  const higher = early.asymptoteC + early.uK > late.asymptoteC + late.uK ? early : late;
  const toComeK = Math.max(0, higher.asymptoteC - rise.to.tempC);
  return { asymptoteC: higher.asymptoteC, uK: higher.uK + MODEL_SHARE * toComeK };
}

function fitFrom(rise: RunLeg, facts: RunFacts, share: number) {
  const { timesS, tempsC } = facts.binned;
  const { fromS, toS } = spanWithTail(rise, facts);
  const startS = fromS + share * (toS - fromS);
  const first = timesS.findIndex((timeS) => timeS >= startS);
  const last = timesS.findLastIndex((timeS) => timeS <= toS);
  if (first < 0 || last - first < 5) return null;
  const fit = fitResponse(timesS.slice(first, last + 1), tempsC.slice(first, last + 1));
  if (!fit) return null;
  const { asymptoteC } = fit;
  return { asymptoteC, uK: totalU(facts, { uK: 2 * fit.asymptoteErrorK, tempC: asymptoteC }) };
}
