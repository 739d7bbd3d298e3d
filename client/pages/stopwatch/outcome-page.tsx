import { useEffect, useState } from 'react';
import type { Analysis } from '#shared/analysis/analysis.ts';
import { specifiedFor } from '#shared/judging/specified-for.ts';
import { ratingOf } from '#shared/judging/judged-by.ts';
import type { HandRun } from '#shared/recorder/replay-run.ts';
import { seriesOfRun, type RunToJudge } from '#shared/recorder/series-of-run.ts';
import { formatBand } from '#shared/wording/format.ts';
import { SAFETY_LINE } from '#shared/wording/safety-lines.ts';
import { wordFinding } from '#shared/wording/word-finding.ts';
import { wordOutcome } from '#shared/wording/word-outcome.ts';
import { SmallStrip } from '../../chart/small-strip.tsx';
import { stripOfRun } from '../../chart/strip-of-run.ts';
import { Key } from '../../components/key.tsx';
import { StopSign } from '../../components/signs.tsx';
import { ThemeWord } from '../../components/theme-word.tsx';
import { useUnsent } from '../../device/this-device.ts';
import { deviceEngine } from './analyse-on-device.ts';
import { analysisInputOf } from './judge-run.ts';
import type { Sources } from './sources.ts';

type OutcomePageProps = { run: HandRun; sources: Sources; onAnother: () => void };

/** What the run shows, at once, whether or not the server can be reached. */
export function OutcomePage({ run, sources, onAnother }: OutcomePageProps) {
  const toJudge = seriesOfRun(run);
  return (
    <main id="main" className="mx-auto min-h-dvh max-w-site bg-paper">
      <header className="sw-top">
        <a className="sw-back" href={`/visits/${run.start.visitId}`}>
          Visit
        </a>
        <div className="sw-what !cursor-default pt-1.5">
          <b>
            {sources.machine.make} {sources.machine.model}
          </b>
          {run.end?.label}
        </div>
        <ThemeWord />
      </header>
      <div className="px-4 pb-8">
        {toJudge ? (
          <Judged run={run} sources={sources} toJudge={toJudge} />
        ) : (
          <>
            <h1 className="pt-5 font-serif text-page">Too few readings</h1>
            <p className="pt-2 text-say">
              Under three readings stand in this run, so there is nothing to judge. What was taken
              is kept.
            </p>
          </>
        )}
        <Sent runId={run.start.runId} />
        <div className="grid gap-2.5 pt-3">
          <Key face="main" size="site" onClick={onAnother}>
            Take another run
          </Key>
          <a className="word justify-center" href={`/visits/${run.start.visitId}`}>
            Back to the visit
          </a>
        </div>
      </div>
    </main>
  );
}

/** What is on this phone alone, and where the run stands once it is sent. */
function Sent({ runId }: { runId: string }) {
  const { unsent } = useUnsent();
  return (
    <div className="border-t border-print pt-3">
      <p role="status" className="words text-table">
        {unsent > 0
          ? `On this phone, ${unsent} to send. It goes when the network is back.`
          : 'Sent. The shop judged it as well.'}
      </p>
      {unsent === 0 && (
        <a className="word" href={`/runs/${runId}`}>
          See the run there
        </a>
      )}
    </div>
  );
}

type JudgedProps = { run: HandRun; sources: Sources; toJudge: RunToJudge };
type Judgement = { state: 'working' } | { state: 'failed' } | { state: 'done'; analysis: Analysis };

function Judged({ run, sources, toJudge }: JudgedProps) {
  const [judgement, setJudgement] = useState<Judgement>({ state: 'working' });
  useEffect(() => {
    if (!run.end) return;
    const input = analysisInputOf(sources, run, run.end.setup, toJudge);
    deviceEngine
      .judge(toJudge.series, input, () => {})
      .then((analysis) => setJudgement({ state: 'done', analysis }))
      .catch(() => setJudgement({ state: 'failed' }));
    // A run that has ended does not change.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, []);

  if (judgement.state === 'working') {
    return (
      <h1 role="status" className="pt-5 font-serif text-page">
        Looking at the run…
      </h1>
    );
  }
  if (judgement.state === 'failed') {
    return (
      <h1 role="alert" className="pt-5 font-serif text-page">
        This phone could not judge the run. It is kept, and the shop judges it.
      </h1>
    );
  }
  return <Verdict run={run} sources={sources} toJudge={toJudge} analysis={judgement.analysis} />;
}

function Verdict({ run, sources, toJudge, analysis }: JudgedProps & { analysis: Analysis }) {
  const { unit } = run.start;
  const bands = run.end && specifiedFor(sources.machine, run.end.setup.setting);
  const about = { unit, judgedBy: ratingOf(bands ?? null), fuel: sources.machine.fuel };
  const [headline, ...others] = analysis.findings;
  if (!headline) return null;
  const { heading, sentence, afterStop } = wordOutcome(analysis.outcome, headline, about);
  const worded = [headline, ...others].map((finding) => wordFinding(finding, about));
  const { timesS, tempsC } = toJudge.series;
  const trace = Array.from(timesS, (timeS, i): [number, number, number] => [
    timeS,
    tempsC[i]!,
    tempsC[i]!,
  ]);
  return (
    <>
      <h1 className="pt-5 font-serif text-page">{heading}</h1>
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
          strip={stripOfRun({ analysis, bands, marks: toJudge.marks, notes: [] })}
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
      </div>
      {worded.map(({ title, sentences, nextChecks }) => (
        <section key={title} className="border-b border-hair py-3">
          <h2 className="font-serif text-finding">{title}</h2>
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
