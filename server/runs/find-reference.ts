import type { ReferenceRun } from '#shared/analysis/analysis.ts';
import { toReferenceRun } from '#shared/analysis/to-reference-run.ts';
import type { RunConditions } from '#shared/schemas/runs.ts';
import type { MachineRuns } from './machine-runs.ts';

/**
 * The machine's newest clean run on the same heat setting and load, with the duct the same way if there is one: what
 * a run is compared with that has nothing clean of its own.
 *
 * @param judged the run to be judged, which is no measure of itself
 */
export async function findReference(
  machineRuns: MachineRuns,
  machineId: string,
  judged: { id: string; conditions: RunConditions },
): Promise<ReferenceRun | null> {
  return (await findReferenceRun(machineRuns, machineId, judged))?.reference ?? null;
}

/** The same with the run that it was made of. */
async function findReferenceRun(
  machineRuns: MachineRuns,
  machineId: string,
  judged: { id: string; conditions: RunConditions },
): Promise<Pick<MachineReference, 'reference' | 'from'> | null> {
  const { setting, load, duct } = judged.conditions;
  const alike = (await machineRuns.list(machineId))
    .filter((run) => run.id !== judged.id)
    .filter((run) => run.conditions.setting === setting && run.conditions.load === load);
  const clean = await machineRuns.onlyClean(alike);
  const chosen = clean.find((run) => run.conditions.duct === duct) ?? clean[0];
  if (!chosen) return null;
  const { analysis } = await machineRuns.judged(chosen);
  const { startedAtMs, conditions } = chosen;
  const reference = toReferenceRun(analysis, conditions.duct === duct);
  return reference && { reference, from: { startedAtMs, duct: conditions.duct } };
}

/** A clean run to go by, for one way of running the machine. */
export type MachineReference = Pick<RunConditions, 'setting' | 'load' | 'duct'> & {
  reference: ReferenceRun;
  /** The run that it was made of: a device sets its own runs beside it, which the shop has not had yet. */
  from: { startedAtMs: number; duct: RunConditions['duct'] };
};

/** What findReference gives for every way that a machine is run, where it gives anything: for a device to take along. */
export async function listReferences(
  machineRuns: MachineRuns,
  machineId: string,
): Promise<MachineReference[]> {
  const found: MachineReference[] = [];
  const ways = new Map<string, RunConditions>();
  for (const { conditions } of await machineRuns.list(machineId)) {
    for (const duct of ['on', 'off'] as const) {
      const way = { ...conditions, duct };
      ways.set(`${way.setting} ${way.load} ${duct}`, way);
    }
  }
  for (const conditions of ways.values()) {
    const chosen = await findReferenceRun(machineRuns, machineId, { id: '', conditions });
    const { setting, load, duct } = conditions;
    if (chosen) found.push({ setting, load, duct, ...chosen });
  }
  return found;
}
