import type { RunNoteEdit, RunNoteRemoval, SentRunNote } from '#shared/schemas/sendings.ts';
import type { KeptThing } from './device-db.ts';
import { newId } from './new-id.ts';
import { keepThing, thisDevice } from './this-device.ts';

/** How chains begin in which a note stands that follows nothing unsent. */
export const NOTES_ALONE = 'notes:';

/** A note on a run; its id is that of the thing. @throws {KeepError} it was not kept */
export async function keepRunNote(note: SentRunNote): Promise<KeptThing> {
  return keepThing('run-note', note, { chain: await chainFor(note.runId) });
}

/** Another text or place for a note. @throws {KeepError} it was not kept */
export async function keepRunNoteEdit(edit: RunNoteEdit): Promise<KeptThing> {
  return keepThing('run-note-edit', edit, { chain: await chainFor(edit.runId) });
}

/** @throws {KeepError} it was not kept */
export async function keepRunNoteRemoval(removal: RunNoteRemoval): Promise<KeptThing> {
  return keepThing('run-note-removal', removal, { chain: await chainFor(removal.runId) });
}

/**
 * Behind whatever of the same run is not sent yet: the run itself, where it was taken by hand, or notes before this
 * one. Otherwise a chain of its own, since one that was sent may have been let go of, and would begin at 1 again.
 */
async function chainFor(runId: string): Promise<string> {
  const person = thisDevice.person();
  const unsent = person ? await thisDevice.things.list(person.id, 'unsent') : [];
  const last = unsent.findLast(({ payload }) => runIdOf(payload) === runId);
  return last?.chain ?? NOTES_ALONE + newId();
}

function runIdOf(payload: unknown): unknown {
  return typeof payload === 'object' && payload !== null && 'runId' in payload
    ? payload.runId
    : undefined;
}
