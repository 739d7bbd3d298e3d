import type { Analysis, AnalysisInput } from '#shared/analysis/analysis.ts';
import type { Series } from '#shared/analysis/series.ts';
import { replayRun, type HandRun } from '#shared/recorder/replay-run.ts';
import type { RunEvent, RunEventOf } from '#shared/recorder/run-event.ts';
import { seriesOfRun, type RunToJudge } from '#shared/recorder/series-of-run.ts';
import { analysisInputOf, isAlike, type Known, type OwnRun } from './judge-run.ts';

type Ended = HandRun & { end: RunEventOf<'end'> };
type Judge = (series: Series, input: AnalysisInput) => Promise<Analysis>;

/** What was judged on this page already, by run. */
const judged = new Map<string, Analysis>();

/**
 * Judges a run as the shop will: by the clean runs before it, also those that the shop has not had yet and that lie on
 * this device alone. These are judged first, in the order in which they were taken.
 *
 * @param kept every run that lies on this device
 */
export async function judgeInTurn(
  known: Known,
  run: Ended,
  toJudge: RunToJudge,
  kept: RunEvent[][],
  judge: Judge,
): Promise<Analysis> {
  const own: OwnRun[] = [];
  for (const before of endedBefore(run, kept)) {
    const input = analysisInputOf({ ...known, own }, before.run, before.run.end.setup, before);
    const { runId } = before.run.start;
    const analysis = judged.get(runId) ?? (await judge(before.series, input));
    judged.set(runId, analysis);
    const { startedAtMs } = before;
    if (isClean(analysis)) own.push({ startedAtMs, duct: before.run.end.setup.duct, analysis });
  }
  const input = analysisInputOf({ ...known, own }, run, run.end.setup, toJudge);
  const analysis = await judge(toJudge.series, input);
  judged.set(run.start.runId, analysis);
  return analysis;
}

function isClean({ findings }: Analysis): boolean {
  return findings.length === 1 && findings[0]?.code === 'in-band';
}

/** Of the same visit, and so of the same machine, on the same heat and load. */
function endedBefore({ start, end }: Ended, kept: RunEvent[][]) {
  return kept
    .flatMap((events) => {
      const run = replayRun(events);
      if (!run || !isEnded(run) || run.start.visitId !== start.visitId) return [];
      if (run.start.runId === start.runId || run.start.wallMs > start.wallMs) return [];
      const toJudge = isAlike(run.end.setup, end.setup) ? seriesOfRun(run) : null;
      return toJudge ? [{ ...toJudge, run }] : [];
    })
    .sort((a, b) => a.startedAtMs - b.startedAtMs);
}

export function isEnded(run: HandRun): run is Ended {
  return run.end !== null && !run.isThrownAway;
}
