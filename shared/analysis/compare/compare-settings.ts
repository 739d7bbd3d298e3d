import type { Analysis } from '../analysis.ts';
import { compareRuns, type RunDifferences } from './run-figures.ts';

/** What runs on a hotter and on a cooler heat setting say together. */
export type SettingsPair = {
  verdict: 'as-it-should' | 'no-difference' | 'backwards' | 'not-enough' | 'cannot-tell';
  /** Why it cannot be told; null where it can. */
  why: 'few-cut-outs' | 'limit-cuts' | 'wide' | null;
  /** How much lower the cooler setting cuts out, K, and half its 95 % interval; null with too few cut-outs. */
  lowerByK: number | null;
  lowerByWithinK: number | null;
  /** How much lower it should, K. */
  expectedK: number;
  /** From the machine's own ratings, or the usual bias heater's effect. */
  expectedFrom: 'ratings' | 'bias-heater';
  /** Cooler less hotter. */
  differences: RunDifferences;
};

/** A bias heater makes the disc open about this much lower, K (15 °F: TM 55-1905-220-14-9, common practice). */
export const BIAS_LOWERS_K = 15 / 1.8;
/** Under this share of what it should be there is as good as no difference. */
const NONE_SHARE = 0.5;

/**
 * Whether the cooler setting cuts out as much lower as it should.
 *
 * Assumes one machine, load and duct, and nothing changed between the runs but the setting. Statistic: the 95 % interval
 * of the difference of the mean cut-outs (Welch's t), against none, half and the whole of what is expected. Where the
 * interval lies across a limit, or a limit cuts before the thermostat, it cannot be told.
 *
 * @param hotter analysis of the run on the hotter setting
 * @param ratedK what the machine is specified to open lower by on the cooler one, K; null where that is not known
 * @param probesErrorK standard error (k = 1) between two probes, K; 0 for the same one
 */
export function compareSettings(
  hotter: Analysis,
  cooler: Analysis,
  { ratedK, probesErrorK }: { ratedK: number | null; probesErrorK: number },
): SettingsPair {
  const differences = compareRuns(hotter, cooler, probesErrorK);
  const expectedK = ratedK ?? BIAS_LOWERS_K;
  const { cutOuts } = differences;
  const cuts = [hotter, cooler].some(({ findings }) =>
    findings.some(({ code }) => code === 'limit-cycling'),
  );
  const why = cuts ? 'limit-cuts' : cutOuts ? null : 'few-cut-outs';
  const verdict =
    why === null && cutOuts
      ? verdictOf(-cutOuts.difference, cutOuts.within, expectedK)
      : 'cannot-tell';
  return {
    verdict,
    why: why ?? (verdict === 'cannot-tell' ? 'wide' : null),
    lowerByK: cutOuts && -cutOuts.difference,
    lowerByWithinK: cutOuts && cutOuts.within,
    expectedK,
    expectedFrom: ratedK === null ? 'bias-heater' : 'ratings',
    differences,
  };
}

function verdictOf(lowerByK: number, withinK: number, expectedK: number): SettingsPair['verdict'] {
  const leastK = lowerByK - withinK;
  const mostK = lowerByK + withinK;
  if (mostK < 0) return 'backwards';
  const noneK = NONE_SHARE * expectedK;
  if (mostK < noneK) return leastK <= 0 ? 'no-difference' : 'not-enough';
  return leastK >= noneK ? 'as-it-should' : 'cannot-tell';
}
