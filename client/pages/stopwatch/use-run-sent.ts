import { thingsOfRun } from '../../device/kept-runs.ts';
import { useOnDevice } from '../../device/use-on-device.ts';

/** What of a run is still on this phone alone, and what the shop turned down. */
export type RunSent = { unsent: number; refused: number };

/** Follows the run's things as they are sent; null: not looked up yet. */
export function useRunSent(runId: string): RunSent | null {
  return useOnDevice(countThings, runId);
}

async function countThings(runId: string): Promise<RunSent> {
  const things = await thingsOfRun(runId);
  const count = (state: 'unsent' | 'refused') => things.filter((thing) => thing.state === state);
  return { unsent: count('unsent').length, refused: count('refused').length };
}
