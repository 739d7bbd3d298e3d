import type { SampleLines } from '../layout/sample-lines.ts';
import type { ReadOptions } from '../log-reading.ts';
import type { LogText } from '../text/decode-text.ts';

/** A file on its way to a reading: its text, the lines that its layout is judged by, and what a person said. */
export type LogFile = {
  text: LogText;
  decode: (bytes: Uint8Array, from: number, to: number) => string;
  sample: SampleLines;
  options: ReadOptions;
};
