import type { Finding, FindingCode } from '../analysis/analysis.ts';
import { boardCauses, boardChecks } from './board-causes.ts';
import { hasBoard, type About, type FindingWords, type WordedFinding } from './finding-words.ts';
import { HEAT_THAT_STAYS } from './heat-that-stays.ts';
import { HEAT_THAT_STOPS } from './heat-that-stops.ts';
import { MISSING_HEAT } from './missing-heat.ts';
import { OUT_OF_BAND } from './out-of-band.ts';
import { UNDECIDED } from './undecided.ts';
import { UNSTEADY } from './unsteady.ts';
import { wordEvidence } from './word-evidence.ts';

const WORDS: Record<FindingCode, FindingWords> = {
  ...HEAT_THAT_STAYS,
  ...HEAT_THAT_STOPS,
  ...MISSING_HEAT,
  ...OUT_OF_BAND,
  ...UNSTEADY,
  ...UNDECIDED,
};

/**
 * A finding in words for a technician: what was seen, what it rests on, what it would be consistent with in order of
 * likelihood (common practice), and the next checks.
 */
export function wordFinding(finding: Finding, about: About): WordedFinding {
  const words = WORDS[finding.code];
  const byBoard = hasBoard(about);
  return {
    title: words.title(finding, about),
    sentences: words.sentences(finding, about),
    evidence: wordEvidence(finding.evidence, about.unit),
    causes: (byBoard && boardCauses(finding.code, about)) || words.causes(finding, about),
    nextChecks: (byBoard && boardChecks(finding.code, about)) || words.nextChecks(finding, about),
  };
}
