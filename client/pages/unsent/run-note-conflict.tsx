import { useState } from 'react';
import { z } from 'zod';
import { newNoteSchema, type NewNote } from '#shared/schemas/runs.ts';
import { runNoteEditSchema, runNoteRemovalSchema } from '#shared/schemas/sendings.ts';
import { formatMoment } from '#shared/wording/format.ts';
import { Key } from '../../components/key.tsx';
import { WordLink } from '../../components/key-link.tsx';
import { Notice } from '../../components/notice.tsx';
import { SectionHead } from '../../components/section-head.tsx';
import type { KeptThing } from '../../device/device-db.ts';
import { keepRunNote, keepRunNoteEdit, keepRunNoteRemoval } from '../../device/run-notes.ts';
import { thisDevice } from '../../device/this-device.ts';
import { timeWords } from '../../format/when.ts';
import { kindWords } from './unsent-words.ts';

/** A note on a run that somebody else changed or removed meanwhile: what each wants, and the choice. */
export function RunNoteConflict({ thing, zone }: { thing: KeptThing; zone: string }) {
  const [error, setError] = useState<Error | null>(null);
  const clash = noteClash(thing);
  if (!clash) return null;
  const settle = (work: () => Promise<unknown>) => {
    work()
      .then(() => drop(thing.id))
      .catch(setError);
  };
  const { runId, mine, theirs } = clash;
  return (
    <section>
      <SectionHead state="changed in both places">{kindWords(thing.kind)}</SectionHead>
      <dl className="grid gap-4 py-3">
        <NoteText name="The shop has" note={theirs} without="Nothing: the note was removed" />
        <NoteText
          name={`On this phone, ${timeWords(thing.madeAtMs, zone)}`}
          note={mine}
          without="Nothing: you removed it"
        />
      </dl>
      {error && <Notice kind="stop" role="alert" head={error.message} className="mb-3" />}
      <div className="flex flex-wrap gap-2">
        <Key size="site" onClick={() => settle(() => sendMine(clash))}>
          {mine ? 'Send mine' : 'Remove it all the same'}
        </Key>
        <Key size="site" onClick={() => settle(() => Promise.resolve())}>
          Leave the shop’s
        </Key>
      </div>
      <WordLink to={`/runs/${runId}`}>Open the run</WordLink>
    </section>
  );
}

async function drop(id: string): Promise<void> {
  await thisDevice.things.drop([id]);
  await thisDevice.changed();
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

type NoteTextProps = { name: string; note: NewNote | null; without: string };

function NoteText({ name, note, without }: NoteTextProps) {
  return (
    <div>
      <dt className="lab">{name}</dt>
      <dd className="text-body">
        {note ? `${note.text}, at ${formatMoment(note.timeS)}` : without}
      </dd>
    </div>
  );
}
