import { Link } from 'react-router-dom';
import type { RunPage } from '#shared/schemas/runs.ts';
import { fromKelvinStep, type DisplayUnit } from '#shared/units.ts';
import type { About } from '#shared/wording/finding-words.ts';
import { formatStep } from '#shared/wording/format.ts';
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
    <header className="gap-x-14 px-4 pt-3.5 pb-4 desk:grid desk:grid-cols-[minmax(320px,1fr)_auto] desk:items-end desk:px-12 desk:pt-[22px] desk:pb-5">
      <p className="lab col-span-2 pb-1">
        <PlaceLink to={`/jobs/${run.job.id}`}>Job {run.job.number}</PlaceLink> ·{' '}
        <PlaceLink to={`/visits/${run.visitId}`}>visit of {day}</PlaceLink> · {run.label}, at{' '}
        {timeWords(run.startedAtMs, zone)} · {conditionWords(run)}
      </p>
      <div className="pb-4 desk:pb-0">
        <PageHeading
          className="max-w-[24ch]"
          title={`${worded?.heading ?? 'Run'}, job ${run.job.number}`}
        >
          {worded?.heading ?? 'Nothing found'}
        </PageHeading>
        {worded && <Outcome outcome={analysis.outcome} sentence={worded.sentence} />}
        {analysis.notJudged && (
          <p className="words pt-1 text-[1rem]">{wordNotJudged(analysis.notJudged)}</p>
        )}
      </div>
      <RunFacts run={run} unit={about.unit} />
    </header>
  );
}

/** A link inside a line of text whose target is as tall as a finger. */
function PlaceLink({ to, children }: { to: string; children: React.ReactNode }) {
  return (
    <Link to={to} className="relative -my-[15px] inline-block py-[15px]">
      {children}
    </Link>
  );
}

function conditionWords({ conditions }: RunPage): string {
  return `duct ${conditions.duct}, ${conditions.load === 'empty' ? 'empty drum' : 'damp load'}, ${conditions.setting} heat`;
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
      className={`words flex items-center gap-3 pt-2 text-[1.1875rem] leading-[1.25] font-medium ${outcome === 'stop' ? 'text-stop' : ''}`}
    >
      <Sign className="size-7" />
      <span>
        <strong className="font-bold">{first}</strong> {rest.join(' ')}
      </span>
    </p>
  );
}

function RunFacts({ run, unit }: { run: RunPage; unit: DisplayUnit }) {
  const { machine, customer, home, conditions, probe } = run;
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
      <RatedFact run={run} unit={unit} />
      <Fact name="Probe">
        {[probe?.name ?? 'not named', conditions.placement].join(', ')}
        <Line>
          {reach
            ? uncertaintyWords(reach, unit)
            : `${run.samples.toLocaleString('en-US')} readings`}
        </Line>
      </Fact>
    </Facts>
  );
}

/** What it was judged by; and what is fitted, where that is known and another thing. */
function RatedFact({ run, unit }: { run: RunPage; unit: DisplayUnit }) {
  const { judgedBy } = run.analysis;
  const fitted = run.fitted.find(({ kind }) => kind === 'cycling-thermostat');
  const isSame = fitted !== undefined && fitted.id === judgedBy?.ratingId;
  return (
    <Fact name={isSame ? 'Fitted' : 'Judged by'}>
      {judgedBy?.name ?? 'no rating known'}
      {judgedBy && <Line>{judgedWords(judgedBy, unit)}</Line>}
      {fitted && !isSame && <Line>fitted: {fitted.name}</Line>}
    </Fact>
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
