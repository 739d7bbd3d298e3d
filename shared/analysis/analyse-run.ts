import type { Analysis, AnalysisInput, Leg } from './analysis.ts';
import { decideOutcome } from './findings/decide-outcome.ts';
import { findFindings } from './findings/find-findings.ts';
import { gatherFacts } from './gather-facts.ts';
import { replayGuard } from './guard/replay-guard.ts';
import type { RunFacts, RunLeg } from './run-facts.ts';
import type { Series } from './series.ts';

/** Of the engine; a stored analysis carries the one that made it. */
export const ANALYSIS_VERSION = '2';

/**
 * A run judged: readings in, points, legs, findings and outcome out.
 *
 * @param series as read, spikes and all; at least one reading
 * @throws {RangeError} the series is not one (see assertSeries)
 */
export function analyseRun(series: Series, input: AnalysisInput): Analysis {
  const facts = gatherFacts(series, input);
  const findings = findFindings(facts);
  return {
    version: ANALYSIS_VERSION,
    samples: series.timesS.length,
    durationS: facts.durationS,
    spikes: facts.spikes,
    gaps: facts.gaps.map(({ fromS, toS }) => ({ fromS, toS })),
    noiseK: facts.noiseK,
    cutOuts: facts.cutOuts,
    resets: facts.resets,
    cycles: facts.cycles,
    legs: facts.legs.map(toLeg),
    findings,
    outcome: decideOutcome(findings, facts),
    notJudged: whyNotJudged(facts),
    guardAlarmS: replayGuard(series, input.marks, input).alarmS,
  };
}

function whyNotJudged({ input, probeTooSlow }: RunFacts): Analysis['notJudged'] {
  if (!input.rating) return 'no-rating';
  return probeTooSlow ? 'probe-too-slow' : null;
}

/** A leg as the analysis shows it: expanded uncertainties, k = 2. */
function toLeg({ kind, from, to, fit, knee }: RunLeg): Leg {
  return {
    kind,
    fromS: from.timeS,
    toS: to.timeS,
    asymptoteC: fit && fit.asymptoteC,
    asymptoteUK: fit && 2 * fit.asymptoteErrorK,
    tauS: fit && fit.tauS,
    tauUS: fit && 2 * fit.tauErrorS,
    knee: knee && { timeS: knee.timeS, tempC: knee.tempC },
  };
}
