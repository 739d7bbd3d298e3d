import { useEffect, useState } from 'react';
import type { KeptThing, ThingState } from './device-db.ts';
import { thisDevice } from './this-device.ts';

export type KeptByState = Record<ThingState, KeptThing[]>;

const STATES: ThingState[] = ['unsent', 'applied', 'conflict', 'refused'];

/** The signed-in person's things on this device, oldest first, as they change; null: not read yet. */
export function useKeptThings(): KeptByState | null {
  const [kept, setKept] = useState<KeptByState | null>(null);
  useEffect(() => {
    let isCurrent = true;
    const read = async () => {
      const personId = thisDevice.person()?.id ?? '';
      const lists = await Promise.all(
        STATES.map((state) => thisDevice.things.list(personId, state)),
      );
      const [unsent = [], applied = [], conflict = [], refused = []] = lists;
      if (isCurrent) setKept({ unsent, applied, conflict, refused });
    };
    void read();
    const stop = thisDevice.subscribe(() => void read());
    return () => {
      isCurrent = false;
      stop();
    };
  }, []);
  return kept;
}
