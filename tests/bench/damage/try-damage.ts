import { damageLog, type DamageKind } from '#tests/support/damage-log.ts';
import { countStrangers, judgeDamage, type Fate } from '#tests/support/judge-damage.ts';
import { seededRandom } from '#tests/support/seeded-random.ts';
import { wholeLogs } from '#tests/support/whole-logs.ts';

/** One try that a person is to look at. */
export type Oddity = { number: number; name: string; kind: DamageKind; at: number; what: string };

export type Batch = {
  counts: Partial<Record<Fate | 'crashed' | 'hung', number>>;
  valueChangesK: number[];
  /** Tries that were told and whose reading still holds some that the whole log has not. */
  toldWithStrangers: number;
  oddities: Oddity[];
};

const HUNG_MS = 5000;
/** Long enough for a few cycles, short enough for thousands of tries a minute. */
const logs = wholeLogs(160);

/** Tries numbers `from` to `to` of a seed: each is one damage of one log, the same at every run. */
export function tryDamage(seed: number, from: number, to: number): Batch {
  const batch: Batch = { counts: {}, valueChangesK: [], toldWithStrangers: 0, oddities: [] };
  for (let number = from; number < to; number++) tryOne(seed, number, batch);
  return batch;
}

function tryOne(seed: number, number: number, batch: Batch): void {
  const random = seededRandom(seed * 1_000_003 + number);
  const log = logs[Math.floor(random() * logs.length)]!;
  const { kind, at, bytes } = damageLog(log.bytes, random);
  const note = (what: string) => batch.oddities.push({ number, name: log.name, kind, at, what });
  const startMs = performance.now();
  let fate: Fate | 'crashed' | 'hung';
  try {
    const judged = judgeDamage(log, bytes);
    fate = judged.fate;
    if (fate === 'told' && countStrangers(log.reading, judged.reading!) > 0) {
      batch.toldWithStrangers++;
    }
    if (fate === 'another value') batch.valueChangesK.push(judged.changeK);
    if (fate === 'silent') note(judged.changeK === Infinity ? 'other times' : 'other readings');
  } catch (error) {
    fate = 'crashed';
    note(error instanceof Error ? error.message : String(error));
  }
  if (performance.now() - startMs > HUNG_MS) {
    fate = 'hung';
    note('took more than 5 s');
  }
  batch.counts[fate] = (batch.counts[fate] ?? 0) + 1;
}
