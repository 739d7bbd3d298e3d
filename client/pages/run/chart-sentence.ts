import type { RunPage } from '#shared/schemas/runs.ts';
import type { DisplayUnit } from '#shared/units.ts';
import { formatRated, formatSpan, formatTemp } from '#shared/wording/format.ts';

/** The chart in one sentence: its name for people who do not see it. */
export function chartSentence(run: RunPage, unit: DisplayUnit): string {
  const { analysis, judgedBy } = run.analysis;
  const cutOuts = analysis.cutOuts.map((point) => point.tempC);
  const turns = [counted(cutOuts.length, 'cut-out'), counted(analysis.resets.length, 'reset')];
  const hot = analysis.findings.find((finding) => finding.code === 'runaway');
  const span =
    cutOuts.length > 0
      ? `, cutting out between ${formatTemp(Math.min(...cutOuts), unit)} and ${formatTemp(Math.max(...cutOuts), unit)}`
      : '';
  const runaway = hot ? `; heat kept coming for ${formatSpan(hot.toS - hot.fromS)}` : '';
  const limit = judgedBy ? `; high limit ${formatRated(judgedBy.highLimitC, unit)}` : '';
  return `Strip chart of exhaust temperature over ${formatSpan(run.durationS)}: ${turns.join(' and ')}${span}${runaway}${limit}.`;
}

function counted(count: number, noun: string): string {
  return `${count === 0 ? 'no' : count} ${noun}${count === 1 ? '' : 's'}`;
}
