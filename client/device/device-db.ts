import { openDB, type DBSchema, type IDBPDatabase } from 'idb';
import type { ThingAnswer } from '#shared/schemas/sendings.ts';

export type ThingState = 'unsent' | 'applied' | 'conflict' | 'refused';

/** A thing as it lies on the device. */
export type KeptThing = {
  id: string;
  kind: string;
  /** Whose it is: nobody else sees or sends it. */
  personId: string;
  order: number;
  madeAtMs: number;
  chain: string | null;
  chainN: number | null;
  payload: unknown;
  state: ThingState;
  /** What the server said last. */
  answer: ThingAnswer | null;
  answeredAtMs: number | null;
};

/** The server's last answer to a question, for when it cannot be asked. */
export type KeptAnswer = { personId: string; url: string; fetchedAtMs: number; answer: unknown };

/** Somebody who was signed in here. */
export type DevicePerson = { id: string; name: string };

export type KeptSession = { personId: string; fetchedAtMs: number; answer: unknown };

export interface DeviceSchema extends DBSchema {
  things: {
    key: string;
    value: KeptThing;
    indexes: {
      state: [personId: string, state: string, order: number];
      /** Things without a chain are not in it. */
      chain: [personId: string, chain: string, chainN: number];
    };
  };
  answers: { key: [personId: string, url: string]; value: KeptAnswer };
  people: { key: string; value: DevicePerson };
  /** One record each, under the store's own name. `order`: of the thing kept last. */
  device: { key: 'device'; value: { deviceId: string; order: number } };
  session: { key: 'session'; value: KeptSession };
}

export type DeviceDb = IDBPDatabase<DeviceSchema>;

/** Through to the storage itself before a write counts as done. */
export const STRICT = { durability: 'strict' } as const;

const VERSION = 1;

/** @param onClosing the browser, or a newer version in another tab, took the store away */
export function openDeviceDb(name: string, onClosing: () => void): Promise<DeviceDb> {
  return openDB<DeviceSchema>(name, VERSION, {
    upgrade(db) {
      const things = db.createObjectStore('things', { keyPath: 'id' });
      things.createIndex('state', ['personId', 'state', 'order']);
      things.createIndex('chain', ['personId', 'chain', 'chainN']);
      db.createObjectStore('answers', { keyPath: ['personId', 'url'] });
      db.createObjectStore('people', { keyPath: 'id' });
      db.createObjectStore('device');
      db.createObjectStore('session');
    },
    blocking(_current, _blocked, event) {
      if (event.target instanceof IDBDatabase) event.target.close();
      onClosing();
    },
    terminated: onClosing,
  });
}
