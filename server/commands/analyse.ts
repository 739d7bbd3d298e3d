import { writeSync } from 'node:fs';
import { resolve } from 'node:path';
import { callerFolder } from '#server/env.ts';
import { analyseFile } from './analyse-file.ts';
import { FlagError, parseFlags, type AnalyseFlags } from './analyse-flags.ts';
import { readMarks } from './analyse-marks.ts';

const STDOUT = 1;
const WRONG_FLAGS = 2;

process.exitCode = main(process.argv.slice(2));

function main(args: string[]): number {
  try {
    const flags = parseFlags(args);
    const marks =
      flags.marksFile === null ? [] : readMarks(resolve(callerFolder(), flags.marksFile));
    return printAll(flags, marks);
  } catch (error) {
    if (!(error instanceof FlagError)) throw error;
    process.stderr.write(`analyse: ${error.message}\n`);
    return WRONG_FLAGS;
  }
}

function printAll(flags: AnalyseFlags, marks: ReturnType<typeof readMarks>): number {
  let failed = false;
  for (const file of flags.files) {
    const line = analyseFile(resolve(callerFolder(), file), file, flags, marks);
    failed ||= 'error' in line;
    print(`${JSON.stringify(line)}\n`);
  }
  return failed ? 1 : 0;
}

/** Whole before the next file is read; a full pipe is waited for, and where nobody reads on, that is the end. */
function print(text: string): void {
  const bytes = Buffer.from(text);
  let from = 0;
  while (from < bytes.length) {
    try {
      from += writeSync(STDOUT, bytes, from);
    } catch (error) {
      const code = error instanceof Error && 'code' in error ? error.code : undefined;
      if (code === 'EPIPE') process.exit(1);
      if (code !== 'EAGAIN') throw error;
    }
  }
}
