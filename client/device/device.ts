import type { SendingKind } from '#shared/schemas/sending-kinds.ts';
import {
  openDeviceDb,
  type DeviceDb,
  type DevicePerson,
  type KeptSession,
  type KeptThing,
} from './device-db.ts';
import { KeepError } from './keep-error.ts';
import { createKeptAnswers } from './kept-answers.ts';
import { createKeptThings, NO_THINGS, type Counts, type NewThing } from './kept-things.ts';

/** What a page shows of the things on this device. */
export type Unsent = Counts & {
  /** Unsent things of people who are not the one signed in. */
  others: { name: string; unsent: number }[];
};

const NOTHING: Unsent = { ...NO_THINGS, others: [] };

export type DeviceParts = {
  name?: string;
  nowMs?: () => number;
  /** Joins the tabs of one browser; undefined: this page is alone. */
  channel?: Pick<BroadcastChannel, 'postMessage' | 'addEventListener' | 'close'> | undefined;
};

export type Device = ReturnType<typeof createDevice>;

/** What lies on this phone or computer, for one tab. Opens its store at the first use. */
export function createDevice({ name = 'fusekeeper', nowMs = Date.now, channel }: DeviceParts = {}) {
  let opening: Promise<DeviceDb> | null = null;
  const db = () => (opening ??= openDeviceDb(name, () => (opening = null)));
  const things = createKeptThings(db, nowMs);
  const answers = createKeptAnswers(db, nowMs);
  const listeners = new Set<() => void>();
  let person: DevicePerson | null = null;
  let unsent = NOTHING;

  async function recount(): Promise<void> {
    const counts = person ? await things.count(person.id) : NO_THINGS;
    const next = { ...counts, others: await countOthers() };
    // The same object while it says the same: who draws it draws no more than it must.
    if (JSON.stringify(next) !== JSON.stringify(unsent)) unsent = next;
    for (const tell of listeners) tell();
  }

  async function countOthers(): Promise<Unsent['others']> {
    const people = await (await db()).getAll('people');
    const others = people.filter(({ id }) => id !== person?.id);
    const counted = others.map(async ({ id, name }) => {
      const { unsent } = await things.count(id);
      return { name, unsent };
    });
    return (await Promise.all(counted)).filter(({ unsent }) => unsent > 0);
  }

  /** Tells this page and the other tabs. */
  async function changed(): Promise<void> {
    channel?.postMessage('things');
    await recount();
  }

  /** Readings before convenience: in a full store, what was read makes room for what was made. */
  async function keepWithRoom(personId: string, thing: NewThing): Promise<KeptThing> {
    try {
      return await things.keep(personId, thing);
    } catch (error) {
      if (!(error instanceof KeepError) || error.problem !== 'full') throw error;
      await answers.clear();
      return things.keep(personId, thing);
    }
  }

  channel?.addEventListener('message', () => void recount());

  return {
    db,
    things,
    answers,
    changed,
    person: () => person,

    /** From now on things are kept for, and sent by, this person. `answer`: what the server said of the session. */
    async open(next: DevicePerson, answer: unknown): Promise<void> {
      person = next;
      const tx = (await db()).transaction(['people', 'session'], 'readwrite');
      const session = { personId: next.id, fetchedAtMs: nowMs(), answer };
      await Promise.all([
        tx.objectStore('people').put(next),
        tx.objectStore('session').put(session, 'session'),
        tx.done,
      ]);
      await answers.sweep(next.id);
      await things.sweep();
      await recount();
    },

    /** The session as the server gave it last, for opening without it. */
    async keptSession(): Promise<KeptSession | undefined> {
      return (await db()).get('session', 'session');
    },

    /** As `open`, with what lies here already. */
    async reopen(known: DevicePerson): Promise<void> {
      person = known;
      await recount();
    },

    /** The server knows this session no longer: nothing opens from the device alone any more. */
    async forget(): Promise<void> {
      await (await db()).delete('session', 'session');
      await answers.clear();
    },

    /** Signed out: what was read goes; what is not sent stays for when the person comes back. */
    async leave(): Promise<void> {
      person = null;
      await this.forget();
      await recount();
    },

    /**
     * Puts something by for the server; resolves once it would survive a power cut.
     * @throws {KeepError} nothing was kept; its message is for the page
     */
    async keep<Kind extends SendingKind>(thing: NewThing<Kind>): Promise<KeptThing> {
      if (!person) throw new KeepError('nobody');
      const kept = await keepWithRoom(person.id, thing);
      // The thing is safe already: telling of it does not hold up whoever kept it.
      void changed();
      return kept;
    },

    unsent: () => unsent,
    subscribe(tell: () => void): () => void {
      listeners.add(tell);
      return () => void listeners.delete(tell);
    },

    async close(): Promise<void> {
      const open = opening;
      opening = null;
      channel?.close();
      (await open)?.close();
    },
  };
}
