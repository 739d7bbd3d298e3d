import type { Knex } from 'knex';
import { AppError } from '#server/errors.ts';
import { judgedWith } from '#shared/judging/judged-with.ts';
import { specifiedFor } from '#shared/judging/specified-for.ts';
import type { JudgingMark } from '#shared/judging/judging.ts';
import type { RunConditions } from '#shared/schemas/runs.ts';
import { findReference } from './find-reference.ts';
import { createMachineRuns } from './machine-runs.ts';
import type { RunSources } from './run-sources.ts';

/** What a technician said of a run; `startedAtMs` null: not known yet. */
export type SaidOfRun = {
  id: string;
  visitId: string;
  conditions: RunConditions;
  marks: JudgingMark[];
  startedAtMs: number | null;
};

export type JudgingOf = ReturnType<typeof createJudgingOf>;

/** Gathers what a run is judged by and with: the machine's rating, the probe in force, a clean run to go by. */
export function createJudgingOf(db: Knex, sources: RunSources) {
  const machineRuns = createMachineRuns(db, sources);

  /** Before the file is read its clock is not known; the visit tells the day, which is all that drift asks. */
  async function judgedWithOf(conditions: RunConditions, atMs: number) {
    const probe = await findProbe(conditions);
    const calibrations = probe ? await sources.listCalibrations(probe.id) : [];
    return judgedWith(probe, calibrations, atMs);
  }

  async function findProbe({ probeId }: RunConditions) {
    if (probeId === null) return null;
    const probe = await sources.findProbe(probeId);
    if (!probe) throw new AppError(400, 'no-probe', 'Choose a probe of the list.');
    return probe;
  }

  return async function judgingOf(log: SaidOfRun) {
    const { machine, visit } = await sources.visitFacts(log.visitId);
    const { minCycles } = await sources.shop();
    const used = await judgedWithOf(log.conditions, log.startedAtMs ?? visit.startsAtMs);
    const judged = specifiedFor(machine, log.conditions.setting);
    const reference = await findReference(machineRuns, machine.id, log);
    return { machine, judged, used, said: { ...log, judgedWith: used, minCycles, reference } };
  };
}
