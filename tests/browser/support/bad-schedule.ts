import { setTimeout as pause } from 'node:timers/promises';
import { seededRandom } from '#tests/support/seeded-random.ts';
import { beginBadDay, type BadDay, type BadLine, type Verdict } from './bad-day.ts';
import type { Fate } from './relay.ts';

const STEPS = 16;

type Chance = { pick: <T>(choices: readonly T[]) => T; below: (most: number) => number };

/** What may happen next; readings most of all. */
const HAPPENINGS = {
  read: async (day, { pick }) => {
    await day.read(pick([true, false]));
    await day.read(false);
  },
  'read, undo': async (day) => {
    await day.read(false);
    await day.undo();
  },
  mark: (day, { pick }) => day.mark(pick(['c', 'h'] as const)),
  offline: (day) => day.setOffline(true),
  online: (day) => day.setOffline(false),
  'server down': (day) => day.serverDown(),
  'server up': (day) => day.serverUp(),
  'look away': (day) => day.lookAway(),
  'send elsewhere': (day) => day.sendElsewhere(),
  'second tab': (day) => day.moveToSecondTab(),
  reload: (day) => day.reload(),
  'tap, reload': async (day, { pick }) => day.reload(await day.typeInHaste(pick([0, 0, 1]))),
  kill: (day) => day.kill(),
  'tap, kill': async (day, { pick, below }) => {
    const doubt = await day.typeInHaste(pick([0, 0, 1]));
    await pause(below(30));
    await day.kill(doubt);
  },
  'answers lost': (day) => day.meets({ is: 'answer-lost' }, { is: 'answer-lost' }),
  'sent twice': (day) => day.meets({ is: 'twice' }, { is: 'twice' }),
  'sending lost': (day) => day.meets({ is: 'lost' }),
  'server killed answering': (day) => day.meets({ is: 'killed-answering' }),
  'server killed applying': (day, { below }) => {
    const fate: Fate = { is: 'killed-applying', afterMs: below(25) };
    day.meets(fate);
  },
} satisfies Record<string, (day: BadDay, chance: Chance) => void | Promise<void>>;

type Happening = keyof typeof HAPPENINGS;
const OFTEN: Happening[] = ['read', 'read', 'read', 'read', 'read', 'server up', 'online'];
const ALL = [...OFTEN, ...(Object.keys(HAPPENINGS) as Happening[])];

export type Played = Verdict & { seed: number; steps: Happening[]; ms: number };

/** One bad day: the same seed, the same things in the same order. Chromium's own timing is its own. */
export async function playBadSchedule(line: BadLine, seed: number): Promise<Played> {
  const random = seededRandom(seed);
  const below = (most: number) => Math.floor(random() * most);
  const pick = <T>(choices: readonly T[]): T => choices[below(choices.length)]!;
  const steps = Array.from({ length: STEPS }, () => pick(ALL));
  const began = performance.now();
  const day = await beginBadDay(line, line.visits[seed % line.visits.length]!);
  let done: Happening[] = [];
  try {
    for (const step of steps) {
      done = [...done, step];
      await HAPPENINGS[step](day, { pick, below });
    }
    while (day.shown.length < 4) await day.read(true);
    const verdict = await day.end(pick([true, false, false, false]));
    return { ...verdict, seed, steps, ms: performance.now() - began };
  } catch (error) {
    // What the page could not do is a fault of the page: it is told with the way that led there.
    const words = error instanceof Error ? error.message : String(error);
    const problems = [`after ${done.join(' | ')}: ${words}`];
    const none = { runId: '', shown: day.shown.length, lost: [], doubled: [] };
    return { ...none, problems, seed, steps, ms: performance.now() - began };
  } finally {
    await day.close();
  }
}
