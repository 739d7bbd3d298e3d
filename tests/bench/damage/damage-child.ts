import { tryDamage } from './try-damage.ts';

/** Takes one range of tries after another from its parent, which ends it where it hangs. */
process.on('message', ([seed, from, to]: [number, number, number]) => {
  process.send?.(tryDamage(seed, from, to));
});

process.on('disconnect', () => process.exit());
