import type { AppParts } from '#server/app.ts';
import { createPeopleRepository } from '#server/people/people-repository.ts';
import { createShopRepository } from '#server/people/shop-repository.ts';
import { openDataFolders } from '#server/runs/data-folders.ts';
import { wireJobs } from '#server/wiring/wire-jobs.ts';
import { wirePeople } from '#server/wiring/wire-people.ts';
import { wireRuns } from '#server/wiring/wire-runs.ts';
import { createDemoClock } from './demo-clock.ts';
import { DEMO_SHOP } from './demo-people.ts';
import { EVERYDAY_JOBS } from './everyday-jobs.ts';
import { FOUR_STORIES } from './four-stories.ts';
import { readSampleLogs } from './sample-log.ts';
import { seedHomes } from './seed-homes.ts';
import { seedJob } from './seed-job.ts';
import { seedPeople } from './seed-people.ts';

/**
 * Lays the demo shop into an empty database, all or nothing; in any other it changes nothing.
 * Everything goes through the services that people use, with a clock that stands where the story is.
 * @returns the tokens of the links that customers have, which nothing else remembers; null where nothing was laid
 */
export async function seedDemo(parts: AppParts): Promise<string[] | null> {
  if (!(await isEmpty(parts))) return null;
  await openDataFolders(parts.dataDir);
  return parts.db.transaction((db) => tell({ ...parts, db }));
}

async function isEmpty({ db }: AppParts): Promise<boolean> {
  const people = await createPeopleRepository(db).list();
  return people.length === 0 && !(await createShopRepository(db).find());
}

async function tell(parts: AppParts): Promise<string[]> {
  const startMs = parts.now().getTime();
  const clock = createDemoClock(startMs, DEMO_SHOP.zone);
  const inStory: AppParts = { ...parts, now: clock.now };
  const people = wirePeople(inStory);
  const jobs = wireJobs(inStory, people);
  const runs = wireRuns(inStory, people, jobs);
  const staff = await seedPeople(inStory);
  const things = await seedHomes(jobs, startMs);
  const logs = await readSampleLogs();
  const stage = { jobs, runs, staff, things, logs, clock, startMs };

  const tokens: string[] = [];
  const jobIds = new Map<string, string>();
  const told = [...FOUR_STORIES, ...EVERYDAY_JOBS];
  for (const job of told.sort((a, b) => clock.at(a.taken) - clock.at(b.taken))) {
    tokens.push(...(await seedJob(stage, job, jobIds)));
  }
  return tokens;
}
