import type { Analysis, AnalysisInput, ReferenceRun } from '#shared/analysis/analysis.ts';
import { toReferenceRun } from '#shared/analysis/to-reference-run.ts';
import type { GuardSetup } from '#shared/analysis/guard/guard-state.ts';
import { probeToJudgeWith, judgedWith } from '#shared/judging/judged-with.ts';
import { ratingOf } from '#shared/judging/judged-by.ts';
import { judgingFor } from '#shared/judging/judging-for.ts';
import { judgingOfSpan } from '#shared/judging/judging.ts';
import { specifiedFor } from '#shared/judging/specified-for.ts';
import type { HandRun } from '#shared/recorder/replay-run.ts';
import type { EndSetup, RunSetup } from '#shared/recorder/run-event.ts';
import type { RunToJudge } from '#shared/recorder/series-of-run.ts';
import type { Sources } from './sources.ts';

export type Known = Pick<
  Sources,
  'machine' | 'probes' | 'calibrations' | 'session' | 'references'
> & {
  /** Runs of this machine that were taken on this device and are clean: the shop may not have had them yet. */
  own?: OwnRun[];
};

/** A clean run that lies on this device. */
export type OwnRun = { startedAtMs: number; duct: EndSetup['duct']; analysis: Analysis };

/** What the guard goes by: the machine's rating for this setting, and the probe in hand. */
export function guardSetupOf(known: Known, { start }: HandRun): GuardSetup {
  const { setting, probeId } = start.setup;
  return {
    rating: ratingOf(specifiedFor(known.machine, setting)),
    probe: probeToJudgeWith(probeUsed(known, probeId, start.wallMs)),
  };
}

/** What the engine goes by on the device: the same, made the same way, as on the server. */
export function analysisInputOf(
  known: Known,
  run: HandRun,
  setup: EndSetup,
  { series, marks, startedAtMs }: RunToJudge,
): AnalysisInput {
  const used = probeUsed(known, setup.probeId, startedAtMs);
  const judging = judgingFor({
    judged: specifiedFor(known.machine, setup.setting),
    judgedWith: used,
    conditions: { ...setup, roomUnit: run.start.unit },
    marks,
    minCycles: known.session.shop.minCycles,
    reference: referenceFor(known, setup),
  });
  return judgingOfSpan(judging, 0, series.timesS.at(-1) ?? 0);
}

/** Whether two runs are of one way of running the machine, the duct left aside. */
export function isAlike(one: EndSetup, other: EndSetup): boolean {
  return one.setting === other.setting && one.load === other.load;
}

type Candidate = { startedAtMs: number; isSameDuct: boolean; reference: ReferenceRun | null };

/** As the server chooses: the newest clean run with the duct the same way, else the newest. */
function referenceFor({ references, own = [] }: Known, setup: EndSetup): ReferenceRun | null {
  const candidates = [...fromShop(references, setup), ...fromHere(own, setup)].sort(
    (a, b) => b.startedAtMs - a.startedAtMs,
  );
  const chosen = candidates.find(({ isSameDuct }) => isSameDuct) ?? candidates[0];
  return chosen?.reference ?? null;
}

function fromShop(references: Known['references'], setup: EndSetup): Candidate[] {
  return references
    .filter((each) => isAlike({ ...setup, ...each }, setup) && each.duct === setup.duct)
    .map(({ reference, from }) => ({
      startedAtMs: from?.startedAtMs ?? 0,
      isSameDuct: from ? from.duct === setup.duct : reference.fall !== null,
      reference,
    }));
}

function fromHere(own: OwnRun[], { duct }: EndSetup): Candidate[] {
  return own.map(({ startedAtMs, duct: ownDuct, analysis }) => {
    const isSameDuct = ownDuct === duct;
    return { startedAtMs, isSameDuct, reference: toReferenceRun(analysis, isSameDuct) };
  });
}

function probeUsed({ probes, calibrations }: Known, probeId: RunSetup['probeId'], atMs: number) {
  const probe = probes.find(({ id }) => id === probeId) ?? null;
  return judgedWith(
    probe,
    calibrations.filter((calibration) => calibration.probeId === probeId),
    atMs,
  );
}
