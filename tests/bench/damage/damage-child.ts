import { tryDamage } from './try-damage.ts';

/** Takes one range of tries after another from its parent, which ends it where it hangs. */
process.on('message', ([seed, from, to]: [number, number, number]) => {
  process.send?.(tryDamage(seed, from, to));
});

// whoever ends the run ends the parent, which still prints what it has
process.on('SIGTERM', () => undefined);
process.on('disconnect', () => process.exit());
