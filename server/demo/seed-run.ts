import { randomUUID } from 'node:crypto';
import { copyFile } from 'node:fs/promises';
import { join } from 'node:path';
import type { Visit } from '#shared/schemas/jobs.ts';
import type { RunConditions } from '#shared/schemas/runs.ts';
import type { DemoStage } from './demo-stage.ts';
import type { DemoNote, DemoRun, DemoVisit } from './demo-story.ts';
import { sampleLogUrl, type SampleLog } from './sample-log.ts';
import { needed } from './seed-people.ts';

const PLACEMENT = 'Centre of the outlet';
const MINUTE_MS = 60_000;
const DAY_MS = 86_400_000;

type RunAtVisit = { visit: Visit; told: DemoVisit; run: DemoRun };

/** A sample log goes the way of an upload: read, judged, stored. @returns the token of its link, if it has one */
export async function seedRun(stage: DemoStage, at: RunAtVisit): Promise<string | null> {
  const { runs, staff, logs, clock } = stage;
  const { visit, told, run } = at;
  const by = staff[told.who];
  const log = needed(logs.get(run.log), run.log);
  const startedAtMs = clock.at({ day: told.day, at: run.at });
  const id = randomUUID();
  const path = join(runs.folders.staged, id);
  await copyFile(sampleLogUrl(run.log), path);

  clock.setTo(startedAtMs + 25 * MINUTE_MS);
  const importing = runs.runs.importRuns(by, {
    id,
    path,
    fileName: run.log,
    choices: { answers: {}, channel: null },
    resultHash: null,
    visitId: visit.id,
    conditions: conditionsOf(stage, run, log),
    marks: log.marks,
    spans: [{ fromS: 0, toS: Infinity, label: run.label }],
    startedAtMs,
  });
  const [runId] = await importing.catch((error: unknown) => {
    throw new Error(`the demo's ${run.log} cannot be taken in`, { cause: error });
  });
  const made = needed(runId, run.log);
  for (const note of run.notes ?? []) await seedNote(stage, at, made, note);
  return run.sharedForDays === undefined ? null : seedShare(stage, at, made, run.sharedForDays);
}

function conditionsOf({ things }: DemoStage, run: DemoRun, log: SampleLog): RunConditions {
  const { duct, load, setting, roomF } = log;
  const probeId = needed(things.probes.get(run.probe), run.probe).id;
  return { placement: PLACEMENT, duct, load, setting, roomTemp: roomF, roomUnit: 'F', probeId };
}

/** A note points at the trace: at the last reading before its time. */
async function seedNote(stage: DemoStage, { told }: RunAtVisit, runId: string, note: DemoNote) {
  const { runs, staff } = stage;
  const stored = await runs.runs.get(runId);
  const correction = await runs.runs.correctionOf(runId);
  const columns = await runs.readings.columns(stored, 0, stored.samples, correction);
  const [, tempC] = needed(
    columns.findLast(([timeS]) => timeS <= note.timeS),
    note.text,
  );
  await runs.notes.add(staff[told.who], runId, { ...note, tempC });
}

/** Made at the end of the visit, opened by the customer the same evening. */
async function seedShare(
  stage: DemoStage,
  { visit, told }: RunAtVisit,
  runId: string,
  days: number,
) {
  const { runs, staff, clock, startMs } = stage;
  clock.setTo(visit.endsAtMs);
  const { token } = await runs.shares.make(staff[told.who], runId, days - told.day);
  clock.setTo(Math.min(visit.endsAtMs + DAY_MS / 4, startMs));
  await runs.shares.open(token);
  return token;
}
