import { plain } from '../cells/parse-number.ts';
import { detectLayout } from '../layout/detect-layout.ts';
import type { Layout } from '../layout/layout.ts';
import type { Answers, LogColumn, ReadOutcome } from '../log-reading.ts';
import { problem } from '../words/problem-words.ts';
import type { LogFile } from './log-file.ts';
import { previewRows } from './preview-rows.ts';
import type { QuestionDraft } from './question-draft.ts';

/**
 * A question with the first rows as each answer would have them. Where it was answered already, and not with one of
 * its options, that is refused by name: to ask again would tell nobody why.
 */
export function askWith(file: LogFile, draft: QuestionDraft, columns: LogColumn[]): ReadOutcome {
  const { about, message, follows = [] } = draft;
  const given = file.options.answers?.[about];
  if (given !== undefined && !follows.includes(given)) {
    const say = draft.options.map(({ answer }) => answer).join(', ');
    return { kind: 'refused', problem: problem('unknown-answer', { about, value: given, say }) };
  }
  const options = draft.options.map(({ answer, label }) => {
    const answers: Answers = { ...file.options.answers, [draft.about]: answer };
    const plan = detectLayout(file.sample, answers);
    const channel = draft.about === 'channel' ? answer : file.options.channel;
    const preview =
      plan.kind === 'layout'
        ? previewRows(file, plan.layout, channelColumn(plan.layout, channel))
        : [];
    return { answer, label, preview };
  });
  return { kind: 'question', question: { about, message, options }, columns };
}

function channelColumn({ columns, tempColumns }: Layout, channel: string | undefined): number {
  const named = columns.find(({ name }) => channel !== undefined && plain(name) === plain(channel));
  return named?.index ?? tempColumns[0]!;
}
