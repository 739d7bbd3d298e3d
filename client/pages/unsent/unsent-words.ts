import type { KeptThing } from '../../device/device-db.ts';
import type { Unsent } from '../../device/device.ts';
import type { SendOutcome } from '../../device/sender.ts';
import { timeWords } from '../../format/when.ts';

/** "3 not sent yet", and what wants a look; '' where all is with the shop. */
export function unsentWords({ unsent, conflict, refused }: Unsent): string {
  const looks = conflict + refused;
  return [unsent > 0 && `${unsent} not sent yet`, looks > 0 && `${looks} to look at`]
    .filter(Boolean)
    .join(', ');
}

export function othersWords({ name, unsent }: Unsent['others'][number]): string {
  return `${unsent} of ${name} on this phone, not sent. ${unsent === 1 ? 'It goes' : 'They go'} when ${name} signs in.`;
}

export function ageWords(fetchedAtMs: number, zone: string): string {
  return `Not connected, as of ${timeWords(fetchedAtMs, zone)}`;
}

/** How the last attempt went, where it did not go. */
export const OUTCOME_WORDS: Record<Exclude<SendOutcome, 'sent'>, string> = {
  unreachable: 'The shop’s server does not answer. It is tried again by itself.',
  'signed-out': 'Sign in again, then it goes.',
  broken: 'The server broke over it. It stays here and is tried again by itself.',
  waiting: 'The server waits for what was done before. It is tried again by itself.',
};

const KIND_WORDS: Record<string, string> = {
  'run-event': 'Run by hand',
  'visit-edit': 'Notes of a visit',
  'safety-ticks': 'Cautions ticked',
  'run-note': 'Note on a run',
  'run-note-edit': 'Note on a run, changed',
  'run-note-removal': 'Note on a run, removed',
};

export function kindWords(kind: string): string {
  return KIND_WORDS[kind] ?? kind;
}

/** Things that are one to a person: a run with all its readings. */
export type ThingGroup = { key: string; things: [KeptThing, ...KeptThing[]] };

export function groupThings(things: readonly KeptThing[]): ThingGroup[] {
  const groups = new Map<string, ThingGroup>();
  for (const thing of things) {
    const key = thing.chain ?? thing.id;
    const group = groups.get(key);
    if (group) group.things.push(thing);
    else groups.set(key, { key, things: [thing] });
  }
  return [...groups.values()];
}

export function groupWords({ things }: ThingGroup): string {
  const [first] = things;
  if (things.length === 1) return kindWords(first.kind);
  const isRun = first.kind === 'run-event';
  return `${kindWords(first.kind)}, ${things.length} ${isRun ? 'readings and marks' : 'changes'}`;
}

/** What was written, where it was words. */
export function textOf({ payload }: KeptThing): string {
  if (typeof payload !== 'object' || payload === null) return '';
  if ('notes' in payload && typeof payload.notes === 'string') return payload.notes;
  const note = 'now' in payload ? payload.now : 'was' in payload ? payload.was : payload;
  if (typeof note !== 'object' || note === null) return '';
  return 'text' in note && typeof note.text === 'string' ? note.text : '';
}
