import { Link } from 'react-router-dom';
import type { RunPage } from '#shared/schemas/runs.ts';
import { fromKelvinStep, type DisplayUnit } from '#shared/units.ts';
import type { About } from '#shared/wording/finding-words.ts';
import { formatSpan, formatStep } from '#shared/wording/format.ts';
import { wordNotJudged } from '#shared/wording/word-call.ts';
import { wordOutcome } from '#shared/wording/word-outcome.ts';
import { Fact, Facts } from '../../components/facts.tsx';
import { PageHeading } from '../../components/page-heading.tsx';
import { DoneSign, NoteSign, StopSign } from '../../components/signs.tsx';
import { machineWords } from '../../format/job-words.ts';
import { longDateWords, timeWords } from '../../format/when.ts';
import { judgedWords, pointsOf, uncertaintyReach } from './about-run.ts';

type TitleBlockProps = { run: RunPage; about: About; zone: string };

/** The verdict is the heading; under it the outcome, beside it what was measured where. */
export function TitleBlock({ run, about, zone }: TitleBlockProps) {
  const { analysis } = run.analysis;
  const headline = analysis.findings[0];
  const worded = headline && wordOutcome(analysis.outcome, headline, about);
  const day = longDateWords(run.startedAtMs, zone);
  return (
    <header className="grid gap-4 px-4 pt-3.5 pb-4 desk:grid-cols-[minmax(0,1fr)_auto] desk:items-end desk:gap-14 desk:px-12 desk:pt-[22px] desk:pb-5">
      <div>
        <p className="lab">
          <Link
            to={`/jobs/${run.job.id}`}
            className="inline-flex min-h-touch items-center desk:min-h-0"
          >
            Job {run.job.number}
          </Link>{' '}
          ·{' '}
          <Link
            to={`/visits/${run.visitId}`}
            className="inline-flex min-h-touch items-center desk:min-h-0"
          >
            visit of {day}
          </Link>{' '}
          · {run.label}
        </p>
        <PageHeading
          className="max-w-[22ch]"
          title={`${worded?.heading ?? 'Run'}, job ${run.job.number}`}
        >
          {worded?.heading ?? 'Nothing found'}
        </PageHeading>
        {worded && <Outcome outcome={analysis.outcome} sentence={worded.sentence} />}
        {analysis.notJudged && (
          <p className="words pt-1 text-[16px]">{wordNotJudged(analysis.notJudged)}</p>
        )}
      </div>
      <RunFacts run={run} unit={about.unit} at={timeWords(run.startedAtMs, zone)} />
    </header>
  );
}

const SIGNS = { stop: StopSign, proven: DoneSign, 'not-proven': NoteSign };

function Outcome({
  outcome,
  sentence,
}: {
  outcome: RunPage['analysis']['analysis']['outcome'];
  sentence: string;
}) {
  const Sign = SIGNS[outcome];
  const [first, ...rest] = sentence.split(/(?<=\.)\s/);
  return (
    <p
      className={`words flex items-center gap-3 pt-2 text-[19px] leading-[1.25] font-medium ${outcome === 'stop' ? 'text-stop' : ''}`}
    >
      <Sign className="size-7" />
      <span>
        <strong className="font-bold">{first}</strong> {rest.join(' ')}
      </span>
    </p>
  );
}

function RunFacts({ run, unit, at }: { run: RunPage; unit: DisplayUnit; at: string }) {
  const { machine, customer, home, conditions, probe } = run;
  const { judgedBy } = run.analysis;
  const reach = uncertaintyReach(pointsOf(run));
  return (
    <Facts>
      <Fact name="Machine">
        {machineWords(machine)}
        {machine.serial && <Line>serial {machine.serial}</Line>}
      </Fact>
      <Fact name="Where">
        {customer.name}
        <Line>{home.address}</Line>
      </Fact>
      <Fact name={run.fitted.length > 0 ? 'Fitted' : 'Specified'}>
        {run.fitted[0]?.name ?? judgedBy?.name ?? 'not known'}
        <Line>{judgedBy ? `judged: ${judgedWords(judgedBy, unit)}` : 'no rating to judge by'}</Line>
      </Fact>
      <Fact name="Probe">
        {[probe?.name ?? 'not named', conditions.placement].join(', ')}
        <Line>
          {reach
            ? uncertaintyWords(reach, unit)
            : `${run.samples.toLocaleString('en-US')} readings`}
        </Line>
      </Fact>
      <Fact name="Run">
        at {at}, {formatSpan(run.durationS)} long
        <Line>
          duct {conditions.duct}, {conditions.load} drum, {conditions.setting}
        </Line>
      </Fact>
    </Facts>
  );
}

function Line({ children }: { children: React.ReactNode }) {
  return <span className="block">{children}</span>;
}

function uncertaintyWords(
  { leastK, mostK }: { leastK: number; mostK: number },
  unit: DisplayUnit,
): string {
  const isAlike = fromKelvinStep(mostK - leastK, unit) < 0.1;
  if (isAlike) return `all figures ±\u00a0${formatStep(mostK, unit)}`;
  return `figures within ±\u00a0${formatStep(mostK, unit)}`;
}
