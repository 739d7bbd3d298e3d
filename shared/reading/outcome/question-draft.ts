import type { QuestionSubject } from '../log-reading.ts';

/** A question before its previews are made; the proposal first. */
export type QuestionDraft = {
  about: QuestionSubject;
  message: string;
  options: { answer: string; label: string }[];
  /** Answers to an earlier question about the same, which leave this one open. */
  follows?: string[];
};
