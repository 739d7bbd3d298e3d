import type { Knex } from 'knex';
import type { Visit } from '#shared/schemas/jobs.ts';

type VisitRow = {
  id: string;
  job_id: string;
  technician_id: string;
  starts_at_ms: number | string;
  ends_at_ms: number | string;
  safety_ticked_at_ms: number | string | null;
  notes: string;
};

/** A visit with its technician's name, and who edited its notes last. */
type JoinedRow = VisitRow & {
  technician: string;
  version: string | null;
  edited_by: string | null;
  edited_at_ms: number | string | null;
};

export type NotesEdit = { version: string; editedBy: string; editedAtMs: number };

/** Half open: from `fromMs` until before `toMs`. */
export type Span = { fromMs: number; toMs: number };

export type VisitRepository = ReturnType<typeof createVisitRepository>;

export function createVisitRepository(db: Knex) {
  const visits = () =>
    db<VisitRow>('visits')
      .join('users', 'users.id', 'visits.technician_id')
      .leftJoin('visit_edits', 'visit_edits.visit_id', 'visits.id')
      .leftJoin('users as editors', 'editors.id', 'visit_edits.edited_by')
      .select<JoinedRow[]>(
        'visits.*',
        'users.name as technician',
        'visit_edits.version',
        'editors.name as edited_by',
        'visit_edits.edited_at_ms',
      );

  return {
    async find(id: string): Promise<Visit | undefined> {
      const [row] = await visits().where('visits.id', id);
      return row && toVisit(row);
    },

    /** Newest first. */
    async listByJobs(jobIds: readonly string[]): Promise<Visit[]> {
      const rows = await visits()
        .whereIn('visits.job_id', jobIds)
        .orderBy('visits.starts_at_ms', 'desc');
      return rows.map(toVisit);
    },

    /** In order of the day; of one technician, or of everyone where null. */
    async listBetween({ fromMs, toMs }: Span, technicianId: string | null): Promise<Visit[]> {
      const query = visits()
        .where('visits.starts_at_ms', '>=', fromMs)
        .where('visits.starts_at_ms', '<', toMs)
        .orderBy(['visits.starts_at_ms', 'visits.id']);
      if (technicianId !== null) void query.where('visits.technician_id', technicianId);
      return (await query).map(toVisit);
    },

    async insert(visit: Visit): Promise<void> {
      await db('visits').insert({
        id: visit.id,
        job_id: visit.jobId,
        technician_id: visit.technician.id,
        starts_at_ms: visit.startsAtMs,
        ends_at_ms: visit.endsAtMs,
        safety_ticked_at_ms: visit.safetyTickedAtMs,
        notes: visit.notes,
      });
    },

    async setSafetyTickedAt(id: string, atMs: number): Promise<void> {
      await db('visits').where({ id }).update({ safety_ticked_at_ms: atMs });
    },

    /** In a transaction: the text and who wrote it belong together. */
    async setNotes(id: string, notes: string, edit: NotesEdit): Promise<void> {
      await db('visits').where({ id }).update({ notes });
      await db('visit_edits')
        .insert({
          visit_id: id,
          version: edit.version,
          edited_by: edit.editedBy,
          edited_at_ms: edit.editedAtMs,
        })
        .onConflict('visit_id')
        .merge();
    },
  };
}

function toVisit(row: JoinedRow): Visit {
  return {
    id: row.id,
    jobId: row.job_id,
    technician: { id: row.technician_id, name: row.technician },
    startsAtMs: Number(row.starts_at_ms),
    endsAtMs: Number(row.ends_at_ms),
    safetyTickedAtMs: row.safety_ticked_at_ms === null ? null : Number(row.safety_ticked_at_ms),
    notes: row.notes,
    notesVersion: row.version ?? '',
    notesEdited:
      row.edited_by === null ? null : { by: row.edited_by, atMs: Number(row.edited_at_ms) },
  };
}
