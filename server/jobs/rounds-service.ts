import type { FittedPartRepository, StoredPart } from '#server/homes/fitted-part-repository.ts';
import type { ShopService } from '#server/people/shop-service.ts';
import type { RatingRepository } from '#server/ratings/rating-repository.ts';
import type { Rounds, Visit } from '#shared/schemas/jobs.ts';
import type { Person } from '#shared/schemas/people.ts';
import type { JobCore, JobCores } from './job-cores.ts';
import type { CardsForVisits } from './job-service.ts';
import { dayBounds, dayOf } from './shop-day.ts';
import type { VisitRepository } from './visit-repository.ts';

export type RoundsService = ReturnType<typeof createRoundsService>;

export type RoundsParts = {
  visits: VisitRepository;
  cores: JobCores;
  fittedParts: FittedPartRepository;
  ratings: RatingRepository;
  shop: ShopService;
  cardsForVisits: CardsForVisits;
  now: () => Date;
};

export function createRoundsService(parts: RoundsParts) {
  const { visits, cores, fittedParts, ratings, shop, cardsForVisits, now } = parts;

  /** What was done last time, in one line; null where the job calls nothing back. */
  async function before(job: JobCore, zone: string): Promise<string | null> {
    if (!job.callsBack) return null;
    const [last, ...earlier] = await visits.listByJobs([job.callsBack.id]);
    if (!last) return `Job ${job.callsBack.number}: no visit was made.`;
    const visitIds = [last, ...earlier].map((visit) => visit.id);
    const done = (await fittedParts.listByMachine(job.machine.id)).filter(
      (part) => part.visitId !== null && visitIds.includes(part.visitId),
    );
    const names = new Map(
      (await ratings.listByIds(done.map((part) => part.ratingId))).map((each) => [
        each.id,
        each.name,
      ]),
    );
    const fitted = done.map((part) => named(part, names.get(part.ratingId) ?? 'a part'));
    return `${lead(job.callsBack.number, last, zone)}: ${fitted.length > 0 ? `${fitted.join(', ')} fitted` : 'no part fitted'}.`;
  }

  return {
    /** A technician's own visits of a day; everyone's for owner and office. `day` null: today. */
    async ofDay(by: Person, day: string | null): Promise<Rounds> {
      const { zone } = await shop.get();
      const shown = day ?? dayOf(now().getTime(), zone);
      const technicianId = by.role === 'technician' ? by.id : null;
      const found = await visits.listBetween(dayBounds(shown, zone), technicianId);
      const jobs = await cores.listByIds(found.map((visit) => visit.jobId));
      const cards = await cardsForVisits(found.map((visit) => visit.id));

      const listed: Rounds['visits'] = [];
      for (const visit of found) {
        const job = jobs.get(visit.jobId);
        if (!job) continue;
        const runs = cards.filter((card) => card.visitId === visit.id);
        listed.push({ ...visit, job, before: await before(job, zone), runs });
      }
      return { day: shown, visits: listed };
    },
  };
}

function lead(number: number, { startsAtMs, technician }: Visit, zone: string): string {
  const format = new Intl.DateTimeFormat('en-GB', {
    timeZone: zone,
    day: 'numeric',
    month: 'long',
  });
  return `Job ${number}, ${format.format(startsAtMs)}, ${technician.name}`;
}

function named({ lot }: StoredPart, name: string): string {
  return lot === '' ? name : `${name} (lot ${lot})`;
}
