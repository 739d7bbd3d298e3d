import { randomUUID } from 'node:crypto';
import { AppError, fieldFault, notFound } from '#server/errors.ts';
import type { RatingRepository } from '#server/ratings/rating-repository.ts';
import type {
  FittedPart,
  Machine,
  MachinePage,
  NewFittedPart,
  NewMachine,
  NewSpecifiedRating,
  RemovedPart,
} from '#shared/schemas/homes.ts';
import type { StoredRating } from '#shared/schemas/ratings.ts';
import type { CustomerRepository } from './customer-repository.ts';
import type { FittedPartRepository, StoredPart } from './fitted-part-repository.ts';
import type { HomeRepository } from './home-repository.ts';
import type { MachineRepository } from './machine-repository.ts';
import type { SpecifiedRatingRepository } from './specified-rating-repository.ts';

/** What a run is judged by: something that opens, and closes again by itself. */
const CYCLING = ['cycling-thermostat', 'thermistor'];

export type MachineService = ReturnType<typeof createMachineService>;

export type MachineParts = {
  machines: MachineRepository;
  homes: HomeRepository;
  customers: CustomerRepository;
  ratings: RatingRepository;
  specified: SpecifiedRatingRepository;
  fittedParts: FittedPartRepository;
  /** The machine that a visit is about; undefined where there is no such visit. */
  machineOfVisit: (visitId: string) => Promise<string | undefined>;
};

export function createMachineService(parts: MachineParts) {
  const { machines, homes, customers, ratings, specified, fittedParts, machineOfVisit } = parts;

  async function get(id: string): Promise<Machine> {
    const machine = await machines.find(id);
    if (!machine) throw notFound();
    return machine;
  }

  async function page(id: string): Promise<MachinePage> {
    const machine = await get(id);
    const home = await homes.find(machine.homeId);
    const customer = home && (await customers.find(home.customerId));
    if (!home || !customer) throw notFound();

    const rated = await specified.listByMachine(id);
    const fitted = await fittedParts.listByMachine(id);
    const used = [...rated, ...fitted].flatMap((each) =>
      'limitRatingId' in each && each.limitRatingId !== null
        ? [each.ratingId, each.limitRatingId]
        : [each.ratingId],
    );
    const find = finder(await ratings.listByIds(used));
    return {
      ...machine,
      home,
      customer,
      specified: rated.map(({ setting, ratingId, limitRatingId }) => ({
        setting,
        rating: find(ratingId),
        limit: limitRatingId === null ? null : find(limitRatingId),
      })),
      fitted: fitted.map((part) => toFittedPart(part, find(part.ratingId))),
    };
  }

  async function checkHome(id: string): Promise<void> {
    if (!(await homes.find(id))) throw fieldFault('homeId', 'Choose a home');
  }

  return {
    page,

    async create(asked: NewMachine): Promise<Machine> {
      await checkHome(asked.homeId);
      const machine = { ...asked, id: randomUUID() };
      await machines.insert(machine);
      return machine;
    },

    async change(id: string, asked: NewMachine): Promise<Machine> {
      await get(id);
      await checkHome(asked.homeId);
      const machine = { ...asked, id };
      await machines.update(machine);
      return machine;
    },

    /** Takes the place of what the machine was specified to have on that setting. */
    async specify(id: string, asked: NewSpecifiedRating): Promise<MachinePage> {
      await get(id);
      const rating = await ratings.find(asked.ratingId);
      if (!rating || !CYCLING.includes(rating.kind)) {
        throw fieldFault('ratingId', 'Choose a cycling thermostat or thermistor');
      }
      const limit = asked.limitRatingId && (await ratings.find(asked.limitRatingId));
      if (asked.limitRatingId !== null && (!limit || CYCLING.includes(limit.kind))) {
        throw fieldFault('limitRatingId', 'Choose a limit, cut-off or fuse');
      }
      await specified.put(id, asked);
      return page(id);
    },

    async fit(id: string, asked: NewFittedPart): Promise<MachinePage> {
      await get(id);
      if (!(await ratings.find(asked.ratingId))) {
        throw fieldFault('ratingId', 'Choose what was fitted');
      }
      if (asked.visitId !== null && (await machineOfVisit(asked.visitId)) !== id) {
        throw fieldFault('visitId', 'Choose a visit to this machine');
      }
      const part = { ...asked, id: randomUUID(), machineId: id, removedAtMs: null, removedWhy: '' };
      await fittedParts.insert(part);
      return page(id);
    },

    async remove(id: string, partId: string, asked: RemovedPart): Promise<MachinePage> {
      const part = (await fittedParts.listByMachine(id)).find((each) => each.id === partId);
      if (!part) throw notFound();
      if (part.removedAtMs !== null) {
        throw new AppError(409, 'part-is-out', 'That part came out before.');
      }
      if (asked.removedAtMs < part.fittedAtMs) {
        throw fieldFault('removedAtMs', 'Enter a time after it was fitted');
      }
      await fittedParts.remove(partId, asked);
      return page(id);
    },
  };
}

function toFittedPart(part: StoredPart, rating: StoredRating): FittedPart {
  const { id, visitId, fittedAtMs, supplier, lot, removedAtMs, removedWhy } = part;
  return { id, visitId, fittedAtMs, supplier, lot, removedAtMs, removedWhy, rating };
}

/** Foreign keys see to it that the rating is there. */
function finder(ratings: StoredRating[]) {
  const byId = new Map(ratings.map((rating) => [rating.id, rating]));
  return (id: string): StoredRating => {
    const rating = byId.get(id);
    if (!rating) throw new Error(`rating ${id} is named but not there`);
    return rating;
  };
}
