import { readdirSync, readFileSync } from 'node:fs';
import { readLog } from '#shared/reading/read-log.ts';
import { EVERY_CASE } from './odd-inputs/every-case.ts';

const SAMPLES = new URL('../../../sample-logs/', import.meta.url);

/** One line a log: how it was read, so that processes in different zones can be held against each other. */
const lines = EVERY_CASE.map(({ row, what, file, answers = {} }) => {
  const bytes = typeof file === 'string' ? new TextEncoder().encode(file) : file;
  return `row ${row}, ${what}: ${inShort(bytes, answers)}`;
});
for (const name of readdirSync(SAMPLES).sort()) {
  if (/\.(csv|txt)$/.test(name)) {
    lines.push(`${name}: ${inShort(readFileSync(new URL(name, SAMPLES)), {})}`);
  }
}
process.stdout.write(JSON.stringify({ zone: new Date(0).getTimezoneOffset(), lines }));

function inShort(bytes: Uint8Array, answers: Record<string, string>): string {
  const outcome = readLog(bytes, { answers });
  if (outcome.kind === 'question') return JSON.stringify(outcome.question);
  if (outcome.kind === 'refused') return JSON.stringify(outcome.problem);
  const { resultHash, startedAt, warnings } = outcome.reading;
  return JSON.stringify({ resultHash, startedAt, warnings });
}
