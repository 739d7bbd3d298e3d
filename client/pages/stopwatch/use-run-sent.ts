import { useEffect, useState } from 'react';
import { thingsOfRun } from '../../device/kept-runs.ts';
import { thisDevice } from '../../device/this-device.ts';

/** What of a run is still on this phone alone, and what the shop turned down. */
export type RunSent = { unsent: number; refused: number };

/** Follows the run's things as they are sent; null: not looked up yet. */
export function useRunSent(runId: string): RunSent | null {
  const [sent, setSent] = useState<RunSent | null>(null);
  useEffect(() => {
    let isCurrent = true;
    const read = async () => {
      const things = await thingsOfRun(runId);
      const unsent = things.filter(({ state }) => state === 'unsent').length;
      const refused = things.filter(({ state }) => state === 'refused').length;
      if (isCurrent) setSent({ unsent, refused });
    };
    void read();
    const stop = thisDevice.subscribe(() => void read());
    return () => {
      isCurrent = false;
      stop();
    };
  }, [runId]);
  return sent;
}
