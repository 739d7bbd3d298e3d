import { createCustomerRepository } from '#server/homes/customer-repository.ts';
import { createCustomerService } from '#server/homes/customer-service.ts';
import { createFittedPartRepository } from '#server/homes/fitted-part-repository.ts';
import { createHomeRepository } from '#server/homes/home-repository.ts';
import { createHomeService } from '#server/homes/home-service.ts';
import { createMachineRepository } from '#server/homes/machine-repository.ts';
import { createMachineService } from '#server/homes/machine-service.ts';
import { createSpecifiedRatingRepository } from '#server/homes/specified-rating-repository.ts';
import { createJobCores } from '#server/jobs/job-cores.ts';
import { createJobRepository } from '#server/jobs/job-repository.ts';
import { createJobService } from '#server/jobs/job-service.ts';
import { createRoundsService } from '#server/jobs/rounds-service.ts';
import { createVisitRepository } from '#server/jobs/visit-repository.ts';
import { createVisitService } from '#server/jobs/visit-service.ts';
import { createCalibrationRepository } from '#server/ratings/calibration-repository.ts';
import { createProbeRepository } from '#server/ratings/probe-repository.ts';
import { createProbeService } from '#server/ratings/probe-service.ts';
import { createRatingRepository } from '#server/ratings/rating-repository.ts';
import { createRatingService } from '#server/ratings/rating-service.ts';
import { createRunCards } from '#server/runs/run-cards.ts';
import type { AppParts } from '#server/app.ts';
import type { PeopleWiring } from './wire-people.ts';

export type JobsWiring = ReturnType<typeof wireJobs>;

/** Customers, homes, machines, what they are rated to do, and the jobs and visits about them. */
export function wireJobs({ db, now }: AppParts, { people, shop }: PeopleWiring) {
  const customers = createCustomerRepository(db);
  const homes = createHomeRepository(db);
  const machines = createMachineRepository(db);
  const fittedParts = createFittedPartRepository(db);
  const ratings = createRatingRepository(db);
  const probes = createProbeRepository(db);
  const calibrations = createCalibrationRepository(db);
  const jobs = createJobRepository(db);
  const visits = createVisitRepository(db);

  const cores = createJobCores({ jobs, machines, homes, customers });
  const cardsForVisits = createRunCards(db).listByVisits;
  const common = { jobs, cores, visits, cardsForVisits, now };

  const machineService = createMachineService({
    machines,
    homes,
    customers,
    ratings,
    specified: createSpecifiedRatingRepository(db),
    fittedParts,
    machineOfVisit: async (visitId) => {
      const visit = await visits.find(visitId);
      return visit && (await jobs.find(visit.jobId))?.machineId;
    },
  });
  return {
    probes,
    calibrations,
    ratings,
    customerService: createCustomerService(customers),
    homeService: createHomeService({ homes, customers, machines }),
    machineService,
    ratingService: createRatingService(ratings),
    probeService: createProbeService(probes, calibrations, now),
    jobService: createJobService({ ...common, machines }),
    visitService: createVisitService({ ...common, people, machines: machineService }),
    roundsService: createRoundsService({ ...common, fittedParts, ratings, shop }),
  };
}
