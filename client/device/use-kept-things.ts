import type { KeptThing, ThingState } from './device-db.ts';
import { thisDevice } from './this-device.ts';
import { useOnDevice } from './use-on-device.ts';

export type KeptByState = Record<ThingState, KeptThing[]>;

const STATES: readonly ThingState[] = ['unsent', 'applied', 'conflict', 'refused'];

/** The signed-in person's things on this device, oldest first, as they change; null: not read yet. */
export function useKeptThings(): KeptByState | null {
  return useOnDevice(findByState, STATES);
}

async function findByState(states: readonly ThingState[]): Promise<KeptByState> {
  const personId = thisDevice.person()?.id ?? '';
  const lists = await Promise.all(states.map((state) => thisDevice.things.list(personId, state)));
  const [unsent = [], applied = [], conflict = [], refused = []] = lists;
  return { unsent, applied, conflict, refused };
}
