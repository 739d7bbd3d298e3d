import { randomUUID } from 'node:crypto';
import { fieldFault, notFound } from '#server/errors.ts';
import type { MachineRepository } from '#server/homes/machine-repository.ts';
import type { JobChange, JobListItem, JobPage, NewJob, Visit } from '#shared/schemas/jobs.ts';
import type { RunCard } from '#shared/schemas/runs.ts';
import type { JobCores } from './job-cores.ts';
import type { JobFilter, JobRepository } from './job-repository.ts';
import type { VisitRepository } from './visit-repository.ts';

/** The runs of these visits, newest first. */
export type CardsForVisits = (visitIds: string[]) => Promise<RunCard[]>;

export type JobService = ReturnType<typeof createJobService>;

export type JobParts = {
  jobs: JobRepository;
  cores: JobCores;
  visits: VisitRepository;
  machines: MachineRepository;
  cardsForVisits: CardsForVisits;
  now: () => Date;
};

export function createJobService(parts: JobParts) {
  const { jobs, cores, visits, machines, cardsForVisits, now } = parts;

  async function page(id: string): Promise<JobPage> {
    const [core] = await cores.of(await jobs.listByIds([id]));
    if (!core) throw notFound();
    const made = await visits.listByJobs([id]);
    const cards = await cardsForVisits(made.map((visit) => visit.id));
    return {
      ...core,
      visits: made.map((visit) => ({
        ...visit,
        runs: cards.filter((card) => card.visitId === visit.id),
      })),
    };
  }

  return {
    page,

    async list(filter: JobFilter): Promise<JobListItem[]> {
      const found = await cores.of(await jobs.list(filter));
      const made = await visits.listByJobs(found.map((job) => job.id));
      const cards = await cardsForVisits(made.map((visit) => visit.id));
      const nowMs = now().getTime();
      return found.map((job) => {
        const ofJob = made.filter((visit) => visit.jobId === job.id);
        const ids = ofJob.map((visit) => visit.id);
        return {
          ...job,
          technicians: [...new Set(ofJob.map((visit) => visit.technician.name))],
          nextVisitAtMs: nextVisitAtMs(ofJob, nowMs),
          lastRun: cards.find((card) => ids.includes(card.visitId)) ?? null,
        };
      });
    },

    async create(asked: NewJob): Promise<JobPage> {
      if (!(await machines.find(asked.machineId))) {
        throw fieldFault('machineId', 'Choose a machine');
      }
      const before = asked.callsBackJobId && (await jobs.find(asked.callsBackJobId));
      if (asked.callsBackJobId !== null && (!before || before.machineId !== asked.machineId)) {
        throw fieldFault('callsBackJobId', 'Choose an earlier job on this machine');
      }
      const takenAtMs = now().getTime();
      const job = await jobs.insert({ ...asked, id: randomUUID(), state: 'booked', takenAtMs });
      return page(job.id);
    },

    async change(id: string, { state }: JobChange): Promise<JobPage> {
      if (!(await jobs.find(id))) throw notFound();
      await jobs.setState(id, state);
      return page(id);
    },

    /** All runs ever made on a machine, newest first. */
    async runsOfMachine(machineId: string): Promise<RunCard[]> {
      if (!(await machines.find(machineId))) throw notFound();
      const ofMachine = await jobs.listByMachine(machineId);
      const made = await visits.listByJobs(ofMachine.map((job) => job.id));
      return cardsForVisits(made.map((visit) => visit.id));
    },
  };
}

/** The soonest visit that is not over. */
function nextVisitAtMs(visits: Visit[], nowMs: number): number | null {
  const ahead = visits.filter((visit) => visit.endsAtMs > nowMs).map((visit) => visit.startsAtMs);
  return ahead.length === 0 ? null : Math.min(...ahead);
}
