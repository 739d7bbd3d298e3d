import type { Knex } from 'knex';
import type { NewNote } from '#shared/schemas/runs.ts';

type NoteRow = {
  id: string;
  run_id: string;
  user_id: string;
  written_at_ms: number | string;
  time_s: number;
  temp_c: number;
  text: string;
};

export type RunNote = NewNote & {
  id: string;
  runId: string;
  userId: string;
  writtenAtMs: number;
};

export type NoteRepository = ReturnType<typeof createNoteRepository>;

export function createNoteRepository(db: Knex) {
  return {
    async insert(note: RunNote): Promise<void> {
      await db<NoteRow>('notes_on_runs').insert({
        id: note.id,
        run_id: note.runId,
        user_id: note.userId,
        written_at_ms: note.writtenAtMs,
        time_s: note.timeS,
        temp_c: note.tempC,
        text: note.text,
      });
    },

    /** In order of time. */
    async list(runId: string): Promise<RunNote[]> {
      const rows = await db<NoteRow>('notes_on_runs')
        .where({ run_id: runId })
        .orderBy(['time_s', 'written_at_ms', 'id']);
      return rows.map(toNote);
    },

    async find(runId: string, id: string): Promise<RunNote | undefined> {
      const row = await db<NoteRow>('notes_on_runs').where({ id, run_id: runId }).first();
      return row && toNote(row);
    },

    /** How many were changed: 0 where this run has no such note. */
    update(runId: string, id: string, { timeS, tempC, text }: NewNote): Promise<number> {
      return db<NoteRow>('notes_on_runs')
        .where({ id, run_id: runId })
        .update({ time_s: timeS, temp_c: tempC, text });
    },

    remove(runId: string, id: string): Promise<number> {
      return db<NoteRow>('notes_on_runs').where({ id, run_id: runId }).delete();
    },
  };
}

function toNote(row: NoteRow): RunNote {
  return {
    id: row.id,
    runId: row.run_id,
    userId: row.user_id,
    writtenAtMs: Number(row.written_at_ms),
    timeS: row.time_s,
    tempC: row.temp_c,
    text: row.text,
  };
}
