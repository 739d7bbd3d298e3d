import type { CustomerRepository } from '#server/homes/customer-repository.ts';
import type { HomeRepository } from '#server/homes/home-repository.ts';
import type { MachineRepository } from '#server/homes/machine-repository.ts';
import type { JobListItem } from '#shared/schemas/jobs.ts';
import type { Job, JobRepository } from './job-repository.ts';

/** A job with whose machine it is about and what it calls back. */
export type JobCore = Omit<JobListItem, 'technicians' | 'nextVisitAtMs' | 'lastRun'>;
export type JobCores = ReturnType<typeof createJobCores>;

export type JobCoresParts = {
  jobs: JobRepository;
  machines: MachineRepository;
  homes: HomeRepository;
  customers: CustomerRepository;
};

/** Puts jobs, machines, homes and customers together: four queries, however many jobs. */
export function createJobCores({ jobs, machines, homes, customers }: JobCoresParts) {
  async function of(found: Job[]): Promise<JobCore[]> {
    const machineById = byId(await machines.listByIds(found.map((job) => job.machineId)));
    const homeIds = [...machineById.values()].map((machine) => machine.homeId);
    const homeById = byId(await homes.listByIds(homeIds));
    const customerIds = [...homeById.values()].map((home) => home.customerId);
    const customerById = byId(await customers.listByIds(customerIds));
    const earlier = byId(await jobs.listByIds(found.flatMap((job) => job.callsBackJobId ?? [])));

    return found.flatMap(({ machineId, callsBackJobId, ...job }) => {
      const machine = machineById.get(machineId);
      const home = machine && homeById.get(machine.homeId);
      const customer = home && customerById.get(home.customerId);
      const before = callsBackJobId === null ? undefined : earlier.get(callsBackJobId);
      const callsBack = before ? pick(before) : null;
      return customer ? [{ ...job, callsBack, customer, home, machine }] : [];
    });
  }

  return {
    of,

    async listByIds(ids: readonly string[]): Promise<Map<string, JobCore>> {
      return byId(await of(await jobs.listByIds(ids)));
    },
  };
}

function pick({ id, number, takenAtMs }: Job): NonNullable<JobCore['callsBack']> {
  return { id, number, takenAtMs };
}

function byId<Thing extends { id: string }>(things: Thing[]): Map<string, Thing> {
  return new Map(things.map((thing) => [thing.id, thing]));
}
