import type { Knex } from 'knex';
import type { JobState } from '#shared/schemas/jobs.ts';

export type Job = {
  id: string;
  number: number;
  machineId: string;
  complaint: string;
  state: JobState;
  takenAtMs: number;
  callsBackJobId: string | null;
};

/** What the Jobs table is narrowed by; null: not by this. */
export type JobFilter = {
  find: string | null;
  state: JobState | null;
  technicianId: string | null;
  callbacks: boolean;
};

type JobRow = {
  id: string;
  number: number;
  machine_id: string;
  complaint: string;
  state: JobState;
  taken_at_ms: number | string;
  calls_back_job_id: string | null;
};

const FIRST_NUMBER = 1001;
/** A table that nobody scrolls to the end of; the search finds what is older. */
const MOST = 500;

export type JobRepository = ReturnType<typeof createJobRepository>;

export function createJobRepository(db: Knex) {
  return {
    /** Newest first, at most 500. */
    async list({ find, state, technicianId, callbacks }: JobFilter): Promise<Job[]> {
      const query = db<JobRow>('jobs').orderBy('number', 'desc').limit(MOST);
      if (state !== null) void query.where({ state });
      if (callbacks) void query.whereNotNull('calls_back_job_id');
      if (technicianId !== null) {
        const theirs = db('visits').where({ technician_id: technicianId }).select('job_id');
        void query.whereIn('id', theirs);
      }
      if (find !== null) void query.whereIn('id', matching(db, find));
      return (await query).map(toJob);
    },

    async find(id: string): Promise<Job | undefined> {
      const row = await db<JobRow>('jobs').where({ id }).first();
      return row && toJob(row);
    },

    async listByIds(ids: readonly string[]): Promise<Job[]> {
      return (await db<JobRow>('jobs').whereIn('id', ids)).map(toJob);
    },

    async listByMachine(machineId: string): Promise<Job[]> {
      return (await db<JobRow>('jobs').where({ machine_id: machineId })).map(toJob);
    },

    /** Gives it the next number. */
    async insert(job: Omit<Job, 'number'>): Promise<Job> {
      return db.transaction(async (trx) => {
        const top = await trx('jobs').max({ number: 'number' }).first();
        const number = Math.max(FIRST_NUMBER, Number(top?.number ?? 0) + 1);
        await trx('jobs').insert(toRow({ ...job, number }));
        return { ...job, number };
      });
    },

    async setState(id: string, state: JobState): Promise<void> {
      await db('jobs').where({ id }).update({ state });
    },
  };
}

/** Ids of jobs in which every word is found: in the number, complaint, customer, address or machine. */
function matching(db: Knex, find: string): Knex.QueryBuilder {
  const query = db('jobs')
    .join('machines', 'machines.id', 'jobs.machine_id')
    .join('homes', 'homes.id', 'machines.home_id')
    .join('customers', 'customers.id', 'homes.customer_id')
    .select('jobs.id');
  for (const word of find.split(/\s+/).filter((each) => each !== '')) {
    void query.where((either) => {
      for (const column of SEARCHED) {
        void either.orWhereRaw("lower(cast(?? as text)) like ? escape '!'", [column, like(word)]);
      }
    });
  }
  return query;
}

const SEARCHED = [
  'jobs.number',
  'jobs.complaint',
  'customers.name',
  'customers.phone',
  'homes.address',
  'homes.town',
  'machines.make',
  'machines.model',
  'machines.serial',
];

function like(word: string): string {
  return `%${word.toLowerCase().replace(/[!%_]/g, '!$&')}%`;
}

function toJob(row: JobRow): Job {
  return {
    id: row.id,
    number: Number(row.number),
    machineId: row.machine_id,
    complaint: row.complaint,
    state: row.state,
    takenAtMs: Number(row.taken_at_ms),
    callsBackJobId: row.calls_back_job_id,
  };
}

function toRow(job: Job): JobRow {
  return {
    id: job.id,
    number: job.number,
    machine_id: job.machineId,
    complaint: job.complaint,
    state: job.state,
    taken_at_ms: job.takenAtMs,
    calls_back_job_id: job.callsBackJobId,
  };
}
