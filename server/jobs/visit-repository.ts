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

/** Half open: from `fromMs` until before `toMs`. */
export type Span = { fromMs: number; toMs: number };

export type VisitRepository = ReturnType<typeof createVisitRepository>;

export function createVisitRepository(db: Knex) {
  const visits = () =>
    db<VisitRow>('visits')
      .join('users', 'users.id', 'visits.technician_id')
      .select<(VisitRow & { technician: string })[]>('visits.*', 'users.name as technician');

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
  };
}

function toVisit(row: VisitRow & { technician: string }): Visit {
  return {
    id: row.id,
    jobId: row.job_id,
    technician: { id: row.technician_id, name: row.technician },
    startsAtMs: Number(row.starts_at_ms),
    endsAtMs: Number(row.ends_at_ms),
    safetyTickedAtMs: row.safety_ticked_at_ms === null ? null : Number(row.safety_ticked_at_ms),
    notes: row.notes,
  };
}
