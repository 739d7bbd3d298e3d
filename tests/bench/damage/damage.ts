import { fork, type ChildProcess } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { FATES } from '#tests/support/judge-damage.ts';
import type { Batch, Oddity } from './try-damage.ts';

const TRIES = 20_000;
const SEED = 1;
const BATCH = 200;
/** A batch takes about a second. */
const PATIENCE_MS = 120_000;
/** A long run says how far it is. */
const TOLD_EVERY = 2000;
const MOST_SHOWN = 40;

/**
 * `npm run bench -- damage [TRIES] [SEED]`: one damage of one sample log a try (a bit, a byte, a mark, a digit, a cut,
 * a lost line end), read, and held against the reading of the whole log. What neither crashes, hangs nor gives another
 * series in silence is right; the rest is listed by its number, and any number can be tried again by itself.
 */
export async function bench(args: string[]): Promise<void> {
  const tries = Number(args[0] ?? TRIES);
  const seed = Number(args[1] ?? SEED);
  const total: Batch = { counts: {}, valueChangesK: [], toldWithStrangers: 0, oddities: [] };
  let child = start();
  for (let from = 0; from < tries; from += BATCH) {
    const to = Math.min(tries, from + BATCH);
    const batch = await oneBatch(child, [seed, from, to]);
    if (batch) add(total, batch);
    else {
      child.kill('SIGKILL');
      child = start();
      total.counts.hung = (total.counts.hung ?? 0) + 1;
      console.log(`hung somewhere in tries ${from} to ${to}`);
    }
    if (to % TOLD_EVERY === 0) console.log(`${to}: ${JSON.stringify(total.counts)}`);
  }
  child.kill('SIGKILL');
  print(total, tries, seed);
}

function start(): ChildProcess {
  return fork(fileURLToPath(new URL('./damage-child.ts', import.meta.url)));
}

/** Null where the child says nothing for too long. */
function oneBatch(child: ChildProcess, range: [number, number, number]): Promise<Batch | null> {
  return new Promise((resolve, reject) => {
    const timer = setTimeout(() => finish(() => resolve(null)), PATIENCE_MS);
    const finish = (how: () => void) => {
      clearTimeout(timer);
      child.removeAllListeners('message');
      child.removeAllListeners('exit');
      how();
    };
    child.once('message', (batch: Batch) => finish(() => resolve(batch)));
    child.once('exit', (code, signal) =>
      finish(() => (signal ? resolve(null) : reject(new Error(`the child ended with ${code}`)))),
    );
    child.send(range);
  });
}

function add(total: Batch, { counts, valueChangesK, toldWithStrangers, oddities }: Batch) {
  total.toldWithStrangers += toldWithStrangers;
  for (const fate of [...FATES, 'crashed', 'hung'] as const) {
    total.counts[fate] = (total.counts[fate] ?? 0) + (counts[fate] ?? 0);
  }
  total.valueChangesK.push(...valueChangesK);
  total.oddities.push(...oddities);
}

function print(total: Batch, tries: number, seed: number): void {
  const { counts, valueChangesK, toldWithStrangers, oddities } = total;
  console.log(`${tries} tries, seed ${seed}`);
  for (const fate of [...FATES, 'crashed', 'hung'] as const) {
    console.log(`${fate.padEnd(14)} ${String(counts[fate] ?? 0).padStart(8)}`);
  }
  console.log(`told, and some reading is still not the whole log's: ${toldWithStrangers}`);
  const changes = valueChangesK.sort((a, b) => a - b);
  const at = (share: number) => (changes[Math.floor(share * (changes.length - 1))] ?? 0).toFixed(1);
  console.log(`another value: by ${at(0.5)} K in half of them, ${at(0.95)} K in 95 of 100`);
  for (const oddity of oddities.slice(0, MOST_SHOWN)) console.log(inWords(oddity));
  if (oddities.length > MOST_SHOWN) console.log(`and ${oddities.length - MOST_SHOWN} more`);
}

function inWords({ number, name, kind, at, what }: Oddity): string {
  return `${number}: ${name}, ${kind} at ${at}: ${what}`;
}
