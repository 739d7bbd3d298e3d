import { readFileSync } from 'node:fs';
import { z } from 'zod';
import type { Mark } from '#shared/analysis/series.ts';
import { FlagError } from './analyse-flags.ts';

const marksSchema = z.array(
  z.object({
    t: z.number(),
    kind: z.enum([
      'click',
      'heat-off',
      'heat-on',
      'flame-on',
      'stopped',
      'door',
      'duct-off',
      'note',
    ]),
    text: z.string().optional(),
  }),
);

/**
 * The marks of a JSON file, in order of time.
 *
 * @throws {FlagError} the file cannot be read or holds no list of marks
 */
export function readMarks(path: string): Mark[] {
  const marks = marksSchema.safeParse(jsonOf(path));
  if (!marks.success) {
    const [issue] = marks.error.issues;
    throw new FlagError(`--marks: ${issue?.path.join('.') ?? ''} ${issue?.message ?? ''}`.trim());
  }
  return marks.data
    .map(({ t, kind, text }) => ({ timeS: t, kind, ...(text === undefined ? {} : { text }) }))
    .sort((a, b) => a.timeS - b.timeS);
}

function jsonOf(path: string): unknown {
  try {
    return JSON.parse(readFileSync(path, 'utf8'));
  } catch (error) {
    const why = error instanceof Error ? error.message : String(error);
    throw new FlagError(`--marks: ${why}`);
  }
}
