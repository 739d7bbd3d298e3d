import type { JobState, Visit } from '#shared/schemas/jobs.ts';
import type { DemoStage } from './demo-stage.ts';
import type { DemoJob, DemoVisit } from './demo-story.ts';
import { seedRun } from './seed-run.ts';
import { needed } from './seed-people.ts';

const SUPPLIER = 'Ferrant Parts';

/** Tells one job from call to now, each step at its own time. @returns the tokens of links made on the way */
export async function seedJob(
  stage: DemoStage,
  told: DemoJob,
  jobIds: Map<string, string>,
): Promise<string[]> {
  const { jobs, clock, things, startMs } = stage;
  clock.setTo(clock.at(told.taken));
  const job = await jobs.jobService.create({
    machineId: needed(things.machines.get(told.machine), told.machine).id,
    complaint: told.complaint,
    callsBackJobId:
      told.callsBack === undefined ? null : needed(jobIds.get(told.callsBack), told.callsBack),
  });
  jobIds.set(told.name, job.id);

  const tokens: string[] = [];
  for (const planned of told.visits) {
    const visit = await book(stage, job.id, planned);
    if (visit.startsAtMs > startMs || planned.day >= 0) continue;
    tokens.push(...(await pay(stage, visit, planned, job.machine.id)));
  }
  await jobs.jobService.change(job.id, { state: stateNow(stage, told) });
  return tokens;
}

function book({ jobs, clock, staff }: DemoStage, jobId: string, planned: DemoVisit) {
  const { day, from, to, who, notes } = planned;
  return jobs.visitService.book(jobId, {
    technicianId: staff[who].id,
    startsAtMs: clock.at({ day, at: from }),
    endsAtMs: clock.at({ day, at: to }),
    notes,
  });
}

/** A visit that was paid: cautions ticked, runs made, parts changed. */
async function pay(stage: DemoStage, visit: Visit, told: DemoVisit, machineId: string) {
  const { jobs, clock, staff } = stage;
  clock.setTo(visit.startsAtMs);
  await jobs.visitService.tickSafety(staff[told.who], visit.id);

  const tokens: string[] = [];
  for (const run of told.runs ?? []) {
    const token = await seedRun(stage, { visit, told, run });
    if (token !== null) tokens.push(token);
  }
  await changeParts(stage, { visit, told, machineId });
  return tokens;
}

type PartsAtVisit = { visit: Visit; told: DemoVisit; machineId: string };

async function changeParts(stage: DemoStage, { visit, told, machineId }: PartsAtVisit) {
  const { machineService } = stage.jobs;
  const { removed, fitted, day, partsAt, to } = told;
  const atMs = stage.clock.at({ day, at: partsAt ?? to });
  if (removed) {
    const { fitted: parts } = await machineService.page(machineId);
    const old = parts.find(
      (part) => part.rating.name === removed.rating && part.removedAtMs === null,
    );
    const { id } = needed(old, removed.rating);
    await machineService.remove(machineId, id, { removedAtMs: atMs, removedWhy: removed.why });
  }
  if (fitted) {
    await machineService.fit(machineId, {
      ratingId: needed(stage.things.ratings.get(fitted.rating), fitted.rating).id,
      visitId: visit.id,
      fittedAtMs: atMs,
      supplier: SUPPLIER,
      lot: fitted.lot,
    });
  }
}

/** Where a visit of today is going on, whoever pays it is on site. */
function stateNow({ clock, startMs }: DemoStage, told: DemoJob): JobState {
  const isOnSite = told.visits.some(({ day, from, to }) => {
    return clock.at({ day, at: from }) <= startMs && startMs < clock.at({ day, at: to });
  });
  return isOnSite ? 'on-site' : told.state;
}
