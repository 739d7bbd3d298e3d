import { useEffect, useState } from 'react';
import type { Analysis } from '#shared/analysis/analysis.ts';
import { ratingOf } from '#shared/judging/judged-by.ts';
import { specifiedFor } from '#shared/judging/specified-for.ts';
import type { HandRun } from '#shared/recorder/replay-run.ts';
import { seriesOfRun, type RunToJudge } from '#shared/recorder/series-of-run.ts';
import type { About } from '#shared/wording/finding-words.ts';
import { Key } from '../../components/key.tsx';
import { ThemeWord } from '../../components/theme-word.tsx';
import { listKeptRuns } from '../../device/kept-runs.ts';
import { deviceEngine } from '../../device/engine/analyse-on-device.ts';
import { FocusedHeading } from './focused-heading.tsx';
import { isEnded, judgeInTurn } from './judge-in-turn.ts';
import { NoteOnRun } from './note-on-run.tsx';
import { ShopAnswer } from './shop-answer.tsx';
import type { Sources } from './sources.ts';
import { Verdict } from './verdict.tsx';

type OutcomePageProps = { run: HandRun; sources: Sources; onAnother: () => void };

/** What the run shows, at once, whether or not the server can be reached. */
export function OutcomePage({ run, sources, onAnother }: OutcomePageProps) {
  // A run that has ended does not change.
  const [toJudge] = useState(() => seriesOfRun(run));
  const judgement = useJudgement(run, sources, toJudge);
  const about = aboutOf(run, sources);
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
        {toJudge && judgement.state === 'done' ? (
          <Verdict {...{ run, sources, toJudge, about }} analysis={judgement.analysis} />
        ) : (
          <NoVerdict state={toJudge ? judgement.state : 'too-short'} />
        )}
        <ShopAnswer
          runId={run.start.runId}
          onPhone={judgement.state === 'done' ? judgement.analysis : null}
          about={about}
          isTooShort={toJudge === null}
        />
        {toJudge && <NoteOnRun runId={run.start.runId} toJudge={toJudge} unit={run.start.unit} />}
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

/** What the words for the run depend on. */
function aboutOf(run: HandRun, { machine }: Sources): About {
  const bands = run.end && specifiedFor(machine, run.end.setup.setting);
  const ducts = run.end ? [run.end.setup.duct] : [];
  return { unit: run.start.unit, judgedBy: ratingOf(bands ?? null), fuel: machine.fuel, ducts };
}

type Judgement =
  { state: 'working' | 'working-here' | 'failed' } | { state: 'done'; analysis: Analysis };

/** The phone's own answer, as it comes. */
function useJudgement(run: HandRun, sources: Sources, toJudge: RunToJudge | null): Judgement {
  const [judgement, setJudgement] = useState<Judgement>({ state: 'working' });
  useEffect(() => {
    if (!toJudge || !isEnded(run)) return;
    const onHere = () => {
      setJudgement({ state: 'working-here' });
      return painted();
    };
    listKeptRuns()
      .then((kept) =>
        judgeInTurn(sources, run, toJudge, kept, (series, input) =>
          deviceEngine.judge(series, input, onHere),
        ),
      )
      .then((analysis) => setJudgement({ state: 'done', analysis }))
      .catch(() => setJudgement({ state: 'failed' }));
    // Judged once: a run that has ended does not change.
  }, [run, sources, toJudge]);
  return judgement;
}

/** Once what was said last stands on the screen. */
function painted(): Promise<void> {
  return new Promise((resolve) => requestAnimationFrame(() => setTimeout(resolve, 0)));
}

type NoVerdictProps = { state: Judgement['state'] | 'too-short' };

function NoVerdict({ state }: NoVerdictProps) {
  if (state === 'too-short') {
    return (
      <>
        <FocusedHeading className="pt-5 font-serif text-page">Too few readings</FocusedHeading>
        <p className="pt-2 pb-3 text-say">
          Under three readings stand in this run, so there is nothing to judge. What was taken is
          kept.
        </p>
      </>
    );
  }
  if (state === 'failed') {
    return (
      <div role="alert">
        <h1 className="pt-5 pb-3 font-serif text-page">
          This phone could not judge the run. It is kept, and the shop judges it.
        </h1>
      </div>
    );
  }
  return (
    <div role="status" className="pt-5 pb-3">
      <FocusedHeading className="font-serif text-page">Looking at the run…</FocusedHeading>
      {state === 'working-here' && (
        <p className="pt-2 text-say">
          This browser gave no worker for it, so the page stands still for some seconds.
        </p>
      )}
    </div>
  );
}
