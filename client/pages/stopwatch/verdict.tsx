import type { Analysis } from '#shared/analysis/analysis.ts';
import { specifiedFor } from '#shared/judging/specified-for.ts';
import type { HandRun } from '#shared/recorder/replay-run.ts';
import type { RunToJudge } from '#shared/recorder/series-of-run.ts';
import type { About } from '#shared/wording/finding-words.ts';
import { formatBand } from '#shared/wording/format.ts';
import { SAFETY_LINE } from '#shared/wording/safety-lines.ts';
import { wordFinding } from '#shared/wording/word-finding.ts';
import { wordOutcome } from '#shared/wording/word-outcome.ts';
import { eventsOf } from '../../chart/chart-events.ts';
import { ChartTable } from '../../chart/chart-table.tsx';
import { buildPyramid } from '../../chart/pyramid.ts';
import { SmallStrip } from '../../chart/small-strip.tsx';
import { stripOfRun } from '../../chart/strip-of-run.ts';
import { StopSign } from '../../components/signs.tsx';
import { FocusedHeading } from './focused-heading.tsx';
import type { Sources } from './sources.ts';

type VerdictProps = {
  run: HandRun;
  sources: Sources;
  toJudge: RunToJudge;
  about: About;
  analysis: Analysis;
};

/** The phone's own answer: outcome, paper, findings. */
export function Verdict({ run, sources, toJudge, about, analysis }: VerdictProps) {
  const { unit } = run.start;
  const bands = run.end && specifiedFor(sources.machine, run.end.setup.setting);
  const [headline, ...others] = analysis.findings;
  if (!headline) return null;
  const { heading, sentence, afterStop } = wordOutcome(analysis.outcome, headline, about);
  const worded = [headline, ...others].map((finding) => wordFinding(finding, about));
  const { timesS, tempsC } = toJudge.series;
  const strip = stripOfRun({ analysis, bands, marks: toJudge.marks, notes: [] });
  const trace = Array.from(timesS, (timeS, i): [number, number, number] => [
    timeS,
    tempsC[i]!,
    tempsC[i]!,
  ]);
  return (
    <>
      <FocusedHeading className="pt-5 font-serif text-page">{heading}</FocusedHeading>
      <p
        className={`flex items-center gap-3 pt-2 font-gothic text-lead font-semibold ${analysis.outcome === 'stop' ? 'text-stop' : ''}`}
      >
        {analysis.outcome === 'stop' && <StopSign />}
        {sentence}
      </p>
      {afterStop.length > 0 && (
        <ol className="mt-3 border-t-bar border-stop">
          {afterStop.map((step) => (
            <li key={step} className="border-b border-hair py-2.5 text-body">
              {step}
            </li>
          ))}
        </ol>
      )}
      <div className="-mx-4 mt-4 border-y border-print bg-strip">
        <SmallStrip
          strip={strip}
          trace={trace}
          unit={unit}
          name={`The run on paper: ${heading}`}
          bandNames={
            bands && {
              opens: `opens ${formatBand(bands.opensC, bands.opensTolK, unit)}`,
              closes: `closes ${formatBand(bands.closesC, bands.closesTolK, unit)}`,
            }
          }
        />
        <div className="px-4">
          <ChartTable
            id="outcome-table"
            pyramid={buildPyramid(timesS, tempsC, strip.gaps)}
            unit={unit}
            events={eventsOf(strip)}
            view={{ fromS: 0, toS: timesS.at(-1) ?? 0 }}
            hasAllReadings
          />
        </div>
      </div>
      {worded.map(({ title, sentences, nextChecks }) => (
        <section key={title} className="border-b border-hair py-3">
          {/* The first one is the page's heading, and is not shown twice. */}
          <h2 className={title === heading ? 'sr-only' : 'font-serif text-finding'}>{title}</h2>
          {sentences.map((said) => (
            <p key={said} className="pt-1 text-body">
              {said}
            </p>
          ))}
          {nextChecks.length > 0 && (
            <>
              <h3 className="lab pt-3">Check next</h3>
              <ul>
                {nextChecks.map((check) => (
                  <li key={check} className="py-1 text-body">
                    {check}
                  </li>
                ))}
              </ul>
            </>
          )}
        </section>
      ))}
      <p className="py-3 text-small text-print">
        Judged on this phone by engine version {analysis.version}. {SAFETY_LINE}
      </p>
    </>
  );
}
