import type { Customer, Home, MachinePage } from '#shared/schemas/homes.ts';
import type { Visit } from '#shared/schemas/jobs.ts';
import type { StoredCalibration } from '#shared/schemas/calibrations.ts';
import type { Person, Shop } from '#shared/schemas/people.ts';
import type { RunCard } from '#shared/schemas/runs.ts';
import type { StoredProbe, StoredRating } from '#shared/schemas/ratings.ts';

/** A visit with the job and the machine that it is about. */
export type VisitFacts = {
  visit: Visit;
  job: { id: string; number: number; complaint: string };
  machine: MachinePage;
  home: Home;
  customer: Customer;
};

/** What the runs ask of the other nouns. Each `find` is undefined where there is no such thing. */
export type RunSources = {
  visitFacts(visitId: string): Promise<VisitFacts>;
  findProbe(id: string): Promise<StoredProbe | undefined>;
  /** Of one probe, in the order that they were recorded in. */
  listCalibrations(probeId: string): Promise<StoredCalibration[]>;
  findPerson(id: string): Promise<Person | undefined>;
  listRatings(): Promise<StoredRating[]>;
  shop(): Promise<Shop>;
  /** All runs ever made on a machine, newest first. */
  runsOfMachine(machineId: string): Promise<RunCard[]>;
};
