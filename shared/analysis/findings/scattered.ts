import type { Finding } from '../analysis.ts';
import type { RunFacts } from '../run-facts.ts';
import { cutOutTrend } from './cut-out-trend.ts';

/** Standard deviation that a sound thermostat keeps under, K (4 °F, common practice: repeats within a few degrees). */
const ALLOWED_SD_K = 4 / 1.8;

/**
 * The judged cut-outs vary about their line by more than a thermostat should, beyond what their own uncertainty
 * explains.
 *
 * Evidence: cutOuts, sdK (own uncertainty taken off), allowedK.
 */
export function findScattered(facts: RunFacts): Finding | null {
  const trend = cutOutTrend(facts);
  if (!facts.input.rating || !trend || trend.ownSdK <= ALLOWED_SD_K) return null;
  return {
    code: 'scattered',
    fromS: trend.fromS,
    toS: trend.toS,
    evidence: { cutOuts: trend.cutOuts, sdK: trend.ownSdK, allowedK: ALLOWED_SD_K },
  };
}
