import { randomUUID } from 'node:crypto';
import { mayRecord } from '#server/access.ts';
import { fieldFault, notFound } from '#server/errors.ts';
import type { MachineService } from '#server/homes/machine-service.ts';
import type { PeopleRepository } from '#server/people/people-repository.ts';
import type { NewVisit, Visit, VisitPage } from '#shared/schemas/jobs.ts';
import type { Person } from '#shared/schemas/people.ts';
import type { JobCores } from './job-cores.ts';
import type { JobRepository } from './job-repository.ts';
import type { CardsForVisits } from './job-service.ts';
import type { VisitRepository } from './visit-repository.ts';

export type VisitService = ReturnType<typeof createVisitService>;

export type VisitParts = {
  visits: VisitRepository;
  jobs: JobRepository;
  cores: JobCores;
  people: PeopleRepository;
  machines: MachineService;
  cardsForVisits: CardsForVisits;
  now: () => Date;
};

export function createVisitService(parts: VisitParts) {
  const { visits, jobs, cores, people, machines, cardsForVisits, now } = parts;

  async function get(id: string): Promise<Visit> {
    const visit = await visits.find(id);
    if (!visit) throw notFound();
    return visit;
  }

  async function page(by: Person, id: string): Promise<VisitPage> {
    const visit = await get(id);
    const job = (await cores.listByIds([visit.jobId])).get(visit.jobId);
    if (!job) throw notFound();
    const runs = await cardsForVisits([id]);
    return { ...visit, job, runs, mayRecord: mayRecord(by, visit.technician.id) };
  }

  return {
    page,

    /** A visit with its job and all that is known of the machine, for what is recorded on it. */
    async facts(id: string) {
      const visit = await get(id);
      const job = await jobs.find(visit.jobId);
      if (!job) throw notFound();
      const machine = await machines.page(job.machineId);
      return { visit, job, machine, home: machine.home, customer: machine.customer };
    },

    async book(jobId: string, asked: NewVisit): Promise<Visit> {
      if (!(await jobs.find(jobId))) throw notFound();
      const technician = (await people.listTechnicians()).find(
        ({ id }) => id === asked.technicianId,
      );
      if (!technician) throw fieldFault('technicianId', 'Choose a technician');
      if (asked.endsAtMs <= asked.startsAtMs) {
        throw fieldFault('endsAtMs', 'End the visit after it starts');
      }
      const { startsAtMs, endsAtMs, notes } = asked;
      const times = { startsAtMs, endsAtMs, safetyTickedAtMs: null };
      const asBooked = { notes, notesVersion: '', notesEdited: null };
      const visit = { id: randomUUID(), jobId, technician, ...times, ...asBooked };
      await visits.insert(visit);
      return visit;
    },

    /** The cautions were read and ticked just now. */
    async tickSafety(by: Person, id: string): Promise<VisitPage> {
      await get(id);
      await visits.setSafetyTickedAt(id, now().getTime());
      return page(by, id);
    },
  };
}
