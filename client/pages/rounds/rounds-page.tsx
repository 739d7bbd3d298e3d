import { useQuery } from '@tanstack/react-query';
import { useSearchParams } from 'react-router-dom';
import type { Rounds } from '#shared/schemas/jobs.ts';
import { daySchema } from '#shared/schemas/primitives.ts';
import { roundsQuery } from '../../api/visits.ts';
import { PhoneTabs, SitePage } from '../../components/frame.tsx';
import { WordLink } from '../../components/key-link.tsx';
import { PageHeading } from '../../components/page-heading.tsx';
import { SectionHead } from '../../components/section-head.tsx';
import { Failed, Waiting } from '../../components/waiting.tsx';
import { dayOf } from '../../format/when.ts';
import { RunningRun } from '../../records/running-run.tsx';
import { useSession } from '../frame/session-context.ts';
import { dayHeading, stepDay } from './day-step.ts';
import { RoundStop } from './round-stop.tsx';
import { usePreparedDay } from './use-prepared-day.ts';
import { byTechnician, countVisits, nextVisit, opensWords } from './rounds-words.ts';

const MINUTE_MS = 60_000;

/** The visits of a day in order: a technician's own, everyone's for the office. */
export function RoundsPage() {
  const [search] = useSearchParams();
  const asked = daySchema.safeParse(search.get('day'));
  const rounds = useQuery({
    ...roundsQuery(asked.success ? asked.data : null),
    refetchInterval: MINUTE_MS,
  });

  if (rounds.isPending)
    return <RoundsFrame heading="Rounds" body={<Waiting>Fetching the day…</Waiting>} />;
  if (rounds.isError) {
    return (
      <RoundsFrame
        heading="Rounds"
        body={<Failed error={rounds.error} onRetry={rounds.refetch} />}
      />
    );
  }
  return <Day rounds={rounds.data} nowMs={rounds.dataUpdatedAt} />;
}

function RoundsFrame({ heading, body }: { heading: string; body: React.ReactNode }) {
  return (
    <SitePage top={<DayHeading>{heading}</DayHeading>} deck={<PhoneTabs />}>
      <div className="px-4">{body}</div>
    </SitePage>
  );
}

function DayHeading({ children }: { children: string }) {
  return (
    <PageHeading className="py-2 !text-[1.6875rem] max-[350px]:!text-[1.5rem]">
      {children}
    </PageHeading>
  );
}

function Day({ rounds, nowMs }: { rounds: Rounds; nowMs: number }) {
  const { person, shop } = useSession();
  const { day, visits } = rounds;
  const today = dayOf(nowMs, shop.zone);
  const isOwn = person.role === 'technician';
  usePreparedDay(isOwn ? visits : null);
  const next = isOwn ? nextVisit(visits, nowMs) : null;
  const state = [
    isOwn && person.name,
    countVisits(visits.length),
    next && day === today && opensWords(next, nowMs),
  ];
  return (
    <SitePage top={<DayHeading>{dayHeading(day, today)}</DayHeading>} deck={<PhoneTabs />}>
      <p className="lab px-4 pt-3">{state.filter(Boolean).join(' · ')}</p>
      <DaySteps day={day} today={today} />
      <div className="px-4">
        <RunningRun />
      </div>
      {visits.length === 0 && <EmptyDay isOwn={isOwn} isToday={day === today} />}
      {isOwn ? (
        <Stops visits={visits} zone={shop.zone} nextId={next?.id} heading="h2" />
      ) : (
        byTechnician(visits).map(({ name, visits: own }) => (
          <section key={name} className="pb-6">
            <div className="px-4">
              <SectionHead site state={countVisits(own.length)}>
                {name}
              </SectionHead>
            </div>
            <Stops visits={own} zone={shop.zone} nextId={undefined} heading="h3" />
          </section>
        ))
      )}
    </SitePage>
  );
}

function DaySteps({ day, today }: { day: string; today: string }) {
  const to = (other: string) => ({ search: other === today ? '' : `?day=${other}` });
  return (
    <nav aria-label="Days" className="flex flex-wrap justify-between gap-x-4 px-4 pb-1">
      <WordLink to={to(stepDay(day, -1))}>Day before</WordLink>
      {day !== today && (
        <WordLink to={to(today)} className="min-w-12 justify-center">
          Today
        </WordLink>
      )}
      <WordLink to={to(stepDay(day, 1))}>Day after</WordLink>
    </nav>
  );
}

type StopsProps = {
  visits: Rounds['visits'];
  zone: string;
  nextId: string | undefined;
  heading: 'h2' | 'h3';
};

function Stops({ visits, zone, nextId, heading }: StopsProps) {
  return (
    <ol className="pb-4">
      {visits.map((visit) => (
        <RoundStop
          key={visit.id}
          visit={visit}
          zone={zone}
          isNext={visit.id === nextId}
          heading={heading}
        />
      ))}
    </ol>
  );
}

function EmptyDay({ isOwn, isToday }: { isOwn: boolean; isToday: boolean }) {
  const when = isToday ? 'today' : 'on this day';
  return (
    <div className="border-t border-print px-4 pt-6 pb-10">
      <h2 className="font-serif text-page leading-[1.12]">
        {isOwn ? `No visit ${when}.` : `Nobody has a visit ${when}.`}
      </h2>
      <p className="pt-2.5 text-say">
        {isOwn
          ? 'The office books visits. One that is booked for you shows here at once.'
          : 'A visit is booked on its job, under Jobs.'}
      </p>
      {!isOwn && (
        <WordLink to="/jobs" className="mt-1">
          Open the jobs
        </WordLink>
      )}
    </div>
  );
}
