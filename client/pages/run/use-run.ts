import { useQuery } from '@tanstack/react-query';
import {
  runNoteEditSchema,
  runNoteRemovalSchema,
  sentRunNoteSchema,
} from '#shared/schemas/sendings.ts';
import type { Note, RunPage } from '#shared/schemas/runs.ts';
import { runQuery } from '../../api/runs.ts';
import { asOf } from '../../device/as-of.ts';
import type { KeptThing } from '../../device/device-db.ts';
import { useKeptThings, type KeptByState } from '../../device/use-kept-things.ts';
import { useSession } from '../frame/session-context.ts';

/** A note as it is here. */
export type NoteHere = Note & {
  /** What the shop has not yet of it; null: it is there as it is shown. */
  unsent: 'written' | 'changed' | 'removed' | null;
};

/** A run as it is here: with the notes that were written on this device. */
export type RunHere = Omit<RunPage, 'notes'> & { notes: NoteHere[] };

/** The run, with what this device did to its notes laid over what the server last said. */
export function useRun(id: string) {
  const run = useQuery(runQuery(id));
  const kept = useKeptThings();
  const { person } = useSession();
  const saidAtMs = asOf.times().get(`/api/runs/${id}`) ?? run.dataUpdatedAt;
  const here =
    run.data && kept ? overlayNotes(run.data, kept, { by: person.name, saidAtMs }) : undefined;
  return { run, here };
}

/**
 * Kept things on top, oldest first.
 *
 * @param told `by`: who writes here. `saidAtMs`: when the server last spoke of the run; what it applied since then
 *   counts too
 */
export function overlayNotes<Run extends Pick<RunPage, 'id' | 'notes'>>(
  run: Run,
  { unsent, applied }: Pick<KeptByState, 'unsent' | 'applied'>,
  told: { by: string; saidAtMs: number },
): Omit<Run, 'notes'> & { notes: NoteHere[] } {
  const since = applied.filter(({ answeredAtMs }) => (answeredAtMs ?? 0) > told.saidAtMs);
  let notes: NoteHere[] = run.notes.map((note) => ({ ...note, unsent: null }));
  for (const thing of [...since, ...unsent].sort((a, b) => a.order - b.order)) {
    notes = withThing(notes, thing, run.id, told.by);
  }
  return { ...run, notes: notes.sort((a, b) => a.timeS - b.timeS) };
}

function withThing(notes: NoteHere[], thing: KeptThing, runId: string, by: string): NoteHere[] {
  const isUnsent = thing.state === 'unsent';
  if (thing.kind === 'run-note') {
    const { data } = sentRunNoteSchema.safeParse(thing.payload);
    if (data?.runId !== runId || notes.some(({ id }) => id === thing.id)) return notes;
    const { timeS, tempC, text } = data;
    const written = { id: thing.id, by, writtenAtMs: thing.madeAtMs };
    return [...notes, { ...written, timeS, tempC, text, unsent: isUnsent ? 'written' : null }];
  }
  if (thing.kind === 'run-note-edit') {
    const { data } = runNoteEditSchema.safeParse(thing.payload);
    if (data?.runId !== runId) return notes;
    return notes.map((note) =>
      note.id === data.noteId
        ? { ...note, ...data.now, unsent: isUnsent ? (note.unsent ?? 'changed') : null }
        : note,
    );
  }
  if (thing.kind !== 'run-note-removal') return notes;
  const { data } = runNoteRemovalSchema.safeParse(thing.payload);
  if (data?.runId !== runId) return notes;
  if (!isUnsent) return notes.filter(({ id }) => id !== data.noteId);
  return notes.map((note) => (note.id === data.noteId ? { ...note, unsent: 'removed' } : note));
}
