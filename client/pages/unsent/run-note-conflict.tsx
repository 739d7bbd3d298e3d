import { z } from 'zod';
import { newNoteSchema, type NewNote } from '#shared/schemas/runs.ts';
import { runNoteEditSchema, runNoteRemovalSchema } from '#shared/schemas/sendings.ts';
import { formatMoment } from '#shared/wording/format.ts';
import { WordLink } from '../../components/key-link.tsx';
import type { KeptThing } from '../../device/device-db.ts';
import { keepRunNote, keepRunNoteEdit, keepRunNoteRemoval } from '../../device/run-notes.ts';
import { ChooseOne } from './choose-one.tsx';

/** A note on a run that somebody else changed or removed meanwhile. */
export function RunNoteConflict({ thing, zone }: { thing: KeptThing; zone: string }) {
  const clash = noteClash(thing);
  if (!clash) return null;
  const { runId, mine, theirs } = clash;
  return (
    <ChooseOne
      {...{ thing, zone }}
      theirs={{
        name: 'The shop has',
        text: theirs ? noteWords(theirs) : 'Nothing: the note was removed',
      }}
      mine={mine ? noteWords(mine) : 'Nothing: you removed it'}
      onSend={() => sendMine(clash)}
      send={mine ? 'Send mine' : 'Remove it all the same'}
    >
      <WordLink to={`/runs/${runId}`}>Open the run</WordLink>
    </ChooseOne>
  );
}

function noteWords({ text, timeS }: NewNote): string {
  return `${text}, at ${formatMoment(timeS)}`;
}

type NoteClash = {
  runId: string;
  noteId: string;
  /** null: removed. */
  mine: NewNote | null;
  theirs: NewNote | null;
};

/** Made on what the shop has now; where the shop removed it, the note is written anew. */
function sendMine({ runId, noteId, mine, theirs }: NoteClash): Promise<unknown> {
  if (mine && theirs) return keepRunNoteEdit({ runId, noteId, was: theirs, now: mine });
  if (mine) return keepRunNote({ runId, ...mine });
  if (theirs) return keepRunNoteRemoval({ runId, noteId, was: theirs });
  return Promise.resolve();
}

const theirsSchema = z.object({ note: newNoteSchema.nullable() });

function noteClash({ kind, answer, payload }: KeptThing): NoteClash | null {
  const theirs = theirsSchema.safeParse(answer?.status === 'conflict' ? answer.server : null);
  const edit = runNoteEditSchema.safeParse(payload);
  const made = kind === 'run-note-edit' ? edit : runNoteRemovalSchema.safeParse(payload);
  if (!theirs.success || !made.success) return null;
  const { runId, noteId } = made.data;
  return { runId, noteId, mine: edit.data?.now ?? null, theirs: theirs.data.note };
}
