import { randomUUID } from 'node:crypto';
import { AppError, notFound } from '#server/errors.ts';
import type { Person } from '#shared/schemas/people.ts';
import type { NewNote } from '#shared/schemas/runs.ts';
import type { NoteRepository } from './note-repository.ts';
import type { RunService } from './run-service.ts';

const MOST_NOTES = 100;

export type NoteService = ReturnType<typeof createNoteService>;

/** Notes at a time and temperature of a run. */
export function createNoteService(
  notes: NoteRepository,
  runs: Pick<RunService, 'get'>,
  now: () => Date,
) {
  async function checkTime(runId: string, { timeS }: NewNote): Promise<void> {
    const run = await runs.get(runId);
    if (timeS <= run.durationS) return;
    throw new AppError(400, 'fields', 'Some of this needs another look.', {
      timeS: 'A time within the run',
    });
  }

  return {
    /** `id`: made where the note was written, where that was not here. */
    async add(by: Person, runId: string, note: NewNote, id: string = randomUUID()): Promise<void> {
      await checkTime(runId, note);
      if ((await notes.list(runId)).length >= MOST_NOTES) {
        throw new AppError(409, 'full', `A run holds at most ${MOST_NOTES} notes.`);
      }
      const writtenAtMs = now().getTime();
      await notes.insert({ ...note, id, runId, userId: by.id, writtenAtMs });
    },

    async change(runId: string, noteId: string, note: NewNote): Promise<void> {
      await checkTime(runId, note);
      if ((await notes.update(runId, noteId, note)) === 0) throw notFound();
    },

    async remove(runId: string, noteId: string): Promise<void> {
      if ((await notes.remove(runId, noteId)) === 0) throw notFound();
    },
  };
}
