import type { Analysis, Finding } from '../analysis/analysis.ts';
import type { Rating } from '../analysis/rating.ts';
import { CUSTOMER_WORDS, type CustomerRun } from './customer-words.ts';
import { formatBand, formatRated, formatSpan, formatTemp } from './format.ts';

export type WordedForCustomer = {
  heading: string;
  safeTonight: { answer: 'yes' | 'no' | 'ask-us'; sentence: string };
  summary: string[];
  /** The chart in one sentence: also its name for screen readers. */
  chartSentence: string;
  meaning: string[];
  next: string[];
};

/**
 * A run in plain words for the person whose machine it is. Honest where nothing is proven; no forecast, no guarantee.
 *
 * @param judgedBy what the machine is specified to have, °C; null where it is not known
 * @throws {RangeError} an analysis without a finding: every analysis has one
 */
export function wordForCustomer(
  analysis: Analysis,
  judgedBy: Rating | null,
  { unit, fuel, duct, load }: Omit<CustomerRun, 'analysis' | 'headline' | 'judgedBy'>,
): WordedForCustomer {
  const headline = analysis.findings[0];
  if (!headline) throw new RangeError('an analysis has at least one finding');
  const run: CustomerRun = { analysis, headline, judgedBy, unit, fuel, duct, load };
  const words = CUSTOMER_WORDS[headline.code];
  return {
    heading: stoppedOtherwise(run) ? 'The air got hotter than it should.' : words.heading,
    safeTonight: safeTonight(run),
    summary: [testSentence(run), words.summary, ...figureSentences(run)],
    chartSentence: chartSentence(run),
    meaning: [...meaningFor(headline, words.meaning), ...ductSentences(run)],
    next: words.next,
  };
}

/** *stop* for a point that reached the ceiling, where the headline alone would sound harmless. */
function stoppedOtherwise({ analysis, headline }: CustomerRun): boolean {
  return analysis.outcome === 'stop' && headline.code === 'in-band';
}

function safeTonight({ analysis, headline, fuel }: CustomerRun): WordedForCustomer['safeTonight'] {
  if (analysis.outcome === 'stop') {
    return {
      answer: 'no',
      sentence: `No. Do not use it. Leave it unplugged${fuel === 'gas' ? ', and its gas closed,' : ''} until we have put it right.`,
    };
  }
  if (analysis.outcome === 'proven') {
    return {
      answer: 'yes',
      sentence: 'Yes. In this test the heat stopped and came back by itself as it should.',
    };
  }
  return CUSTOMER_WORDS[headline.code].tonight;
}

function testSentence({ analysis, duct, load }: CustomerRun): string {
  const drum = load === 'empty' ? 'an empty drum' : 'a damp load';
  const pipe =
    duct === 'on' ? 'the pipe to the outside connected' : 'the pipe to the outside taken off';
  return `We ran the machine for ${formatSpan(analysis.durationS)} with ${drum} and ${pipe}, and measured the air that leaves it.`;
}

function figureSentences(run: CustomerRun): string[] {
  const { analysis, judgedBy, headline, unit } = run;
  if (!judgedBy) return [];
  const should = `The heat should stop at ${formatBand(judgedBy.opensC, judgedBy.opensTolK, unit)}`;
  if (headline.code === 'runaway') {
    const { peakC } = headline.evidence;
    const reached = typeof peakC === 'number' ? ` The air reached ${formatTemp(peakC, unit)}.` : '';
    return [`${should}, and it did not.${reached}`];
  }
  const judged = analysis.cutOuts.filter((point) => point.judged);
  if (judged.length === 0) return [`${should}.`];
  const figures = listOf(judged.slice(0, 6).map((point) => formatTemp(point.tempC, unit)));
  return [`${should}. It stopped at ${figures}.`];
}

function chartSentence({ analysis, judgedBy, unit }: CustomerRun): string {
  const rounds = analysis.cycles.length;
  const told = rounds === 1 ? 'one full round of heat' : `${rounds} full rounds of heat`;
  const line = `The line is the temperature of the air over ${formatSpan(analysis.durationS)}, with ${told}`;
  if (!judgedBy) return `${line}.`;
  return `${line}; the upper stripe is where the heat should stop, the lower one where it should come back, and the line at ${formatRated(judgedBy.highLimitC, unit)} is where the air must not go.`;
}

function meaningFor({ code, evidence }: Finding, meaning: string[]): string[] {
  if (code !== 'too-short') return meaning;
  if (evidence.reason === 'damp-load') {
    return [
      'The load was still damp, and damp clothes keep the air cool until they are nearly dry.',
      ...meaning,
    ];
  }
  if (evidence.reason === 'no-rating') {
    return [
      'We do not yet know what this machine is made to do, so we only show what it did.',
      ...meaning,
    ];
  }
  return meaning;
}

function ductSentences({ duct, headline }: CustomerRun): string[] {
  if (headline.code !== 'in-band' || duct === 'on') return [];
  return ['The pipe was off in this test, so it says nothing of the pipe.'];
}

function listOf(words: string[]): string {
  if (words.length < 2) return words.join('');
  return `${words.slice(0, -1).join(', ')} and ${words.at(-1)}`;
}
