import { detectLayout } from './layout/detect-layout.ts';
import { sampleLines } from './layout/sample-lines.ts';
import type { ReadOptions, ReadOutcome } from './log-reading.ts';
import { askWith } from './outcome/ask-with.ts';
import type { LogFile } from './outcome/log-file.ts';
import { refuseAnswers } from './outcome/refuse-answers.ts';
import { refuseEarly, refuseLongLines } from './outcome/refuse-early.ts';
import { readInOrder } from './outcome/settle-date-order.ts';
import { decodeText } from './text/decode-text.ts';
import { textDecoderFor } from './text/split-lines.ts';

/**
 * Reads a log: bytes to series, or a question, or a refusal; never a silent guess. Preview and import are
 * this one call.
 *
 * @param bytes the whole file, untouched
 * @param options answers and corrections of a person
 */
export function readLog(bytes: Uint8Array, options: ReadOptions = {}): ReadOutcome {
  const answers = options.answers ?? {};
  const wrong = refuseAnswers(answers);
  if (wrong) return { kind: 'refused', problem: wrong };
  const text = decodeText(bytes, answers.encoding);
  const decode = textDecoderFor(text.encoding);
  const early = refuseEarly(bytes, text);
  if (early) return { kind: 'refused', problem: early };
  const sample = sampleLines(text.bytes, decode);
  const long = refuseLongLines(sample);
  if (long) return { kind: 'refused', problem: long };
  const file: LogFile = { text, decode, sample, options };
  const plan = detectLayout(sample, answers);
  if (plan.kind === 'problem') return { kind: 'refused', problem: plan.problem };
  if (plan.kind === 'question') return askWith(file, plan.question, plan.columns);
  return readInOrder(file, plan.layout, plan.orders, plan.warnings);
}
