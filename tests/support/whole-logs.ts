import { readdirSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { readLog } from '#shared/reading/read-log.ts';
import type { Answers } from '#shared/reading/log-reading.ts';
import type { WholeLog } from './judge-damage.ts';

const FOLDER = new URL('../../sample-logs/', import.meta.url);
const LF = 10;

export type NamedLog = WholeLog & { name: string };

/** Every sample log, its first lines only: 25 layouts, clocks, encodings and units. */
export function wholeLogs(mostLines: number): NamedLog[] {
  const names = readdirSync(FOLDER).filter((name) => /\.(csv|txt)$/.test(name));
  return names.sort().map((name) => {
    const bytes = firstLines(readFileSync(fileURLToPath(new URL(name, FOLDER))), mostLines);
    return { name, ...answered(bytes, {}, name) };
  });
}

/** A question that a shortened log leads to gets its first answer, as a person would give it. */
function answered(bytes: Uint8Array, answers: Answers, name: string): WholeLog {
  const outcome = readLog(bytes, { answers });
  if (outcome.kind === 'refused') throw new Error(`${name}: ${outcome.problem.message}`);
  if (outcome.kind === 'read') return { bytes, answers, reading: outcome.reading };
  const { about, options } = outcome.question;
  return answered(bytes, { ...answers, [about]: options[0]!.answer }, name);
}

function firstLines(bytes: Uint8Array, mostLines: number): Uint8Array {
  let lines = 0;
  for (let i = 0; i < bytes.length; i++) {
    if (bytes[i] === LF && ++lines === mostLines) {
      // a line feed of UTF-16, low octet first, has its zero after it
      return bytes.slice(0, bytes[i + 1] === 0 ? i + 2 : i + 1);
    }
  }
  return bytes;
}
