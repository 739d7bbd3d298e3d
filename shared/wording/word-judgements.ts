import type { Analysis } from '../analysis/analysis.ts';
import type { Apart, Compared } from './compare-judgements.ts';
import type { About } from './finding-words.ts';
import { wordFinding } from './word-finding.ts';
import { wordOutcome } from './word-outcome.ts';

/** Who judged a run: this phone, or the shop's server. */
export type JudgedThere = { analysis: Analysis; about: About };

/** Two answers on one run, side by side in words. */
export type WordedJudgements = {
  heading: string;
  sentences: string[];
  /** What each says; empty where both say the same and nothing needs to be set side by side. */
  sides: { name: string; verdict: string; findings: string[] }[];
};

/**
 * How the shop's answer stands to that of the phone. Neither is passed over: where they differ, both are told, with
 * the version that made each, and which one counts.
 */
export function wordJudgements(
  phone: JudgedThere,
  shop: JudgedThere,
  { isSameVersion, apart }: Compared,
): WordedJudgements {
  const versions = isSameVersion
    ? []
    : [
        `This phone judged by engine version ${phone.analysis.version}, the shop by version ${shop.analysis.version}.`,
        ...whichIsOlder(phone.analysis.version, shop.analysis.version),
      ];
  if (apart.length === 0) {
    const same = isSameVersion ? [] : [...versions, 'Findings, calls and figures are the same.'];
    return { heading: 'The shop’s analysis agrees.', sentences: same, sides: [] };
  }
  return {
    heading: 'The shop’s analysis differs.',
    sentences: [
      apartSentence(apart),
      ...(isSameVersion ? [WHY_THE_SAME_VERSION] : versions),
      'The shop’s answer counts: it stands on the run, and is what a customer may be sent.',
      ...(saysStop(phone) !== saysStop(shop) ? [ONE_SAYS_STOP] : []),
    ],
    sides: [sideOf('This phone', phone), sideOf('The shop', shop)],
  };
}

const WHY_THE_SAME_VERSION =
  'Both judged by the same engine, by other facts: a rating, a probe or another run of this machine was changed at the shop since this phone last heard of it.';
const ONE_SAYS_STOP =
  'One of the two says stop: keep the machine from heating until somebody has looked into it.';

const APART_WORDS: Record<Apart, string> = {
  outcome: 'the outcome',
  findings: 'the findings',
  points: 'which cut-outs and resets were found',
  calls: 'the calls on cut-outs and resets',
  figures: 'figures of cut-outs and resets',
};

function apartSentence(apart: Apart[]): string {
  const [last = '', ...others] = apart.map((each) => APART_WORDS[each]).reverse();
  const before = others.reverse().join(', ');
  return `Apart are ${before ? `${before} and ${last}` : last}.`;
}

/** Versions are whole numbers, rising; of others nothing is said. */
function whichIsOlder(phone: string, shop: string): string[] {
  const [ours, theirs] = [Number(phone), Number(shop)];
  if (ours < theirs) {
    return ['The phone’s is older: take the new version of the application once no run goes on.'];
  }
  if (ours > theirs) return ['The shop’s is older: have its server brought up to date.'];
  return [];
}

function saysStop({ analysis }: JudgedThere): boolean {
  return analysis.outcome === 'stop';
}

function sideOf(name: string, { analysis, about }: JudgedThere) {
  const { findings, outcome, version } = analysis;
  const [headline] = findings;
  return {
    name: `${name}, engine version ${version}`,
    verdict: headline ? wordOutcome(outcome, headline, about).sentence : '',
    findings: findings.map((finding) => wordFinding(finding, about).title),
  };
}
