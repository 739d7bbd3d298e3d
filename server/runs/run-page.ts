import type { Knex } from 'knex';
import { ANALYSIS_VERSION } from '#shared/analysis/analyse-run.ts';
import { mayRecord } from '#server/access.ts';
import { notFound } from '#server/errors.ts';
import type { FittedPart, MachinePage } from '#shared/schemas/homes.ts';
import type { Person } from '#shared/schemas/people.ts';
import type { StoredProbe, StoredRating } from '#shared/schemas/ratings.ts';
import type { Note, RunPage } from '#shared/schemas/runs.ts';
import { createAnalysisRepository } from './analysis-repository.ts';
import { probeOf } from '#shared/judging/judged-by.ts';
import { createMachineRuns, wasIn } from './machine-runs.ts';
import { createNoteRepository } from './note-repository.ts';
import type { Run } from './run.ts';
import { findRunPairs } from './run-pairs.ts';
import { createRunRepository } from './run-repository.ts';
import type { RunSources, VisitFacts } from './run-sources.ts';

export type RunPages = ReturnType<typeof createRunPages>;

/** All that the run page shows, for one reader. @param engineVersion what judging again would be done by */
export function createRunPages(db: Knex, sources: RunSources, engineVersion = ANALYSIS_VERSION) {
  const runs = createRunRepository(db);
  const analyses = createAnalysisRepository(db);
  const notes = createNoteRepository(db);
  const machineRuns = createMachineRuns(db, sources);

  /** The newest result whole, the others by name. */
  async function results(runId: string): Promise<Pick<RunPage, 'analysis' | 'earlier'>> {
    const [newest, ...earlier] = await analyses.listHeads([runId]);
    const analysis = newest && (await analyses.find(newest.id));
    if (!analysis) throw new Error(`run ${runId} has no analysis`);
    return {
      analysis,
      earlier: earlier.map(({ id, madeAtMs, judgedBy, version }) => ({
        ...{ id, madeAtMs, judgedBy, version },
      })),
    };
  }

  async function notesOf(runId: string): Promise<Note[]> {
    const written = await notes.list(runId);
    return Promise.all(
      written.map(async ({ id, timeS, tempC, text, userId, writtenAtMs }) => {
        const by = await sources.findPerson(userId);
        return { id, timeS, tempC, text, writtenAtMs, by: by?.name ?? '' };
      }),
    );
  }

  async function fileOf(uploadId: string): Promise<RunPage['file']> {
    const file = await runs.findUpload(uploadId);
    if (!file) throw new Error(`upload ${uploadId} has no row`);
    return { name: file.fileName, bytes: file.bytes, sha256: file.sha256 };
  }

  return {
    results,

    async get(reader: Person, id: string): Promise<RunPage> {
      const run = await runs.find(id);
      if (!run) throw notFound();
      const facts = await sources.visitFacts(run.visitId);
      const { probeId, setting } = run.conditions;
      const probe = probeId === null ? undefined : await sources.findProbe(probeId);
      return {
        ...whatWasRecorded(run),
        ...whereItWas(facts),
        ...(await results(id)),
        engineVersion,
        probe: probe ? toProbe(probe) : null,
        fitted: fittedAt(facts.machine.fitted, run.startedAtMs),
        otherRatings: ratingsToJudgeBy(facts.machine, setting, await sources.listRatings()),
        file: await fileOf(run.uploadId),
        pairs: await findRunPairs(run, facts.machine, machineRuns),
        notes: await notesOf(id),
        mayWrite: mayRecord(reader, facts.visit.technician.id),
      };
    },
  };
}

function whatWasRecorded(run: Run) {
  const { id, visitId, label, startedAtMs, conditions, marks } = run;
  const { samples, durationS, channel, channelUnit, reading } = run;
  const { skippedCount, skippedRows, warnings } = reading;
  return {
    ...{ id, visitId, label, startedAtMs, conditions, marks },
    ...{ samples, durationS, channel, channelUnit, skippedCount, skippedRows, warnings },
    channels: [channel, ...run.channels.map(({ name }) => name)],
  };
}

function whereItWas({ visit, job, machine, home, customer }: VisitFacts) {
  const { make, model, serial, fuel, control } = machine;
  return {
    job: { id: job.id, number: job.number },
    machine: { id: machine.id, make, model, serial, fuel, control },
    customer: { id: customer.id, name: customer.name },
    home: { id: home.id, address: home.address },
    technician: visit.technician.name,
  };
}

function toProbe(probe: StoredProbe): RunPage['probe'] {
  const { accuracyK, responseS } = probeOf(probe);
  return { id: probe.id, name: probe.name, accuracyK, responseS };
}

/** What was in the machine when the run was made, as far as it is known. */
function fittedAt(parts: FittedPart[], atMs: number): RunPage['fitted'] {
  return parts
    .filter((part) => wasIn(part, atMs))
    .map(({ rating: { id, kind, name } }) => ({ id, kind, name }));
}

/** Ratings that open and close again, the machine's own first. */
function ratingsToJudgeBy(machine: MachinePage, setting: string, ratings: StoredRating[]) {
  const own = machine.specified.find((each) => each.setting === setting)?.rating.id;
  return ratings
    .filter(({ closes }) => closes !== null)
    .sort((a, b) => Number(b.id === own) - Number(a.id === own))
    .map(({ id, name }) => ({ id, name }));
}
