import type { Knex } from 'knex';

/** What a technician's own visits open to them. Names the tables only to ask whether a way leads there. */
export type Scope = ReturnType<typeof createScopeRepository> & {
  /** Staged uploads lie in no table; who keeps them knows. */
  sentUpload(personId: string, uploadId: string): Promise<boolean>;
};

export function createScopeRepository(db: Knex) {
  const ownVisits = (technicianId: string) =>
    db('visits')
      .where('visits.technician_id', technicianId)
      .join('jobs', 'jobs.id', 'visits.job_id')
      .join('machines', 'machines.id', 'jobs.machine_id');

  /** Homes of own visits, as a subquery. */
  const ownHomes = (technicianId: string) => ownVisits(technicianId).select('machines.home_id');

  const runs = () => db('runs').join('visits', 'visits.id', 'runs.visit_id');

  return {
    ownVisitIds: async (technicianId: string): Promise<string[]> =>
      ownVisits(technicianId).pluck<string[]>('visits.id'),

    ownHomeIds: async (technicianId: string): Promise<string[]> =>
      ownVisits(technicianId).distinct().pluck<string[]>('machines.home_id'),

    ownsVisit: (technicianId: string, visitId: string) =>
      exists(ownVisits(technicianId).where('visits.id', visitId)),

    ownsJob: (technicianId: string, jobId: string) =>
      exists(ownVisits(technicianId).where('jobs.id', jobId)),

    seesHome: (technicianId: string, homeId: string) =>
      exists(ownVisits(technicianId).where('machines.home_id', homeId)),

    seesMachine: (technicianId: string, machineId: string) =>
      exists(
        db('machines').where('machines.id', machineId).whereIn('home_id', ownHomes(technicianId)),
      ),

    seesJob: (technicianId: string, jobId: string) =>
      exists(
        db('jobs')
          .join('machines', 'machines.id', 'jobs.machine_id')
          .where('jobs.id', jobId)
          .whereIn('machines.home_id', ownHomes(technicianId)),
      ),

    seesRun: (technicianId: string, runId: string) =>
      exists(
        runs()
          .join('jobs', 'jobs.id', 'visits.job_id')
          .join('machines', 'machines.id', 'jobs.machine_id')
          .where('runs.id', runId)
          .whereIn('machines.home_id', ownHomes(technicianId)),
      ),

    ownsRun: (technicianId: string, runId: string) =>
      exists(runs().where({ 'runs.id': runId, 'visits.technician_id': technicianId })),

    ownsRunOfShare: (technicianId: string, shareId: string) =>
      exists(
        runs()
          .join('shares', 'shares.run_id', 'runs.id')
          .where({ 'shares.id': shareId, 'visits.technician_id': technicianId }),
      ),
  };
}

async function exists(query: Knex.QueryBuilder): Promise<boolean> {
  const row = await query.count({ n: '*' }).first<{ n: number | string } | undefined>();
  return Number(row?.n ?? 0) > 0;
}
