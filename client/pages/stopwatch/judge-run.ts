import type { AnalysisInput } from '#shared/analysis/analysis.ts';
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

type Known = Pick<Sources, 'machine' | 'probes' | 'calibrations' | 'session' | 'references'>;

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
  { series, marks }: RunToJudge,
): AnalysisInput {
  const used = probeUsed(known, setup.probeId, run.start.wallMs);
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

function referenceFor({ references }: Known, { setting, load, duct }: EndSetup) {
  const alike = references.find(
    (each) => each.setting === setting && each.load === load && each.duct === duct,
  );
  return alike?.reference ?? null;
}

function probeUsed({ probes, calibrations }: Known, probeId: RunSetup['probeId'], atMs: number) {
  const probe = probes.find(({ id }) => id === probeId) ?? null;
  return judgedWith(
    probe,
    calibrations.filter((calibration) => calibration.probeId === probeId),
    atMs,
  );
}
