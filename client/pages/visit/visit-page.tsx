import { useParams } from 'react-router-dom';
import { SitePage } from '../../components/frame.tsx';
import { WordLink } from '../../components/key-link.tsx';
import { CallbackNotice } from '../../components/notice.tsx';
import { PageHeading } from '../../components/page-heading.tsx';
import { Failed, Waiting } from '../../components/waiting.tsx';
import { JOB_STATE_WORDS, quoted } from '../../format/job-words.ts';
import { dayOf, daysBetween, momentWords, timeWords } from '../../format/when.ts';
import { useSession } from '../frame/session-context.ts';
import { Reach } from '../rounds/reach.tsx';
import { MachineSection } from './machine-section.tsx';
import { NotesSection } from './notes-section.tsx';
import { RunsSection } from './runs-section.tsx';
import { SafetySection } from './safety-section.tsx';
import { TopLines } from './top-lines.tsx';
import { useVisit, type VisitHere } from './use-visit.ts';
import { VisitKeys } from './visit-keys.tsx';

/** The on-site page of a visit, for one hand. */
export function VisitPage() {
  const { id = '' } = useParams();
  const { visit, here } = useVisit(id);
  const back = { to: '/rounds', name: 'Rounds' };

  if (here) return <Opened visit={here} nowMs={visit.dataUpdatedAt} />;
  if (!visit.isError) {
    return (
      <SitePage back={back} top={<TopLines head="Visit" />}>
        <div className="px-4">
          <Waiting>Fetching the visit…</Waiting>
        </div>
      </SitePage>
    );
  }
  return (
    <SitePage back={back} top={<TopLines head="Visit" />}>
      <div className="px-4">
        <Failed error={visit.error} onRetry={visit.refetch} />
      </div>
    </SitePage>
  );
}

function Opened({ visit, nowMs }: { visit: VisitHere; nowMs: number }) {
  const { shop } = useSession();
  const { job } = visit;
  const { zone } = shop;
  const day = dayOf(visit.startsAtMs, zone);
  const where = [job.home.address, job.machine.place].filter(Boolean).join(', ');
  return (
    <SitePage
      back={{ to: day === dayOf(nowMs, zone) ? '/rounds' : `/rounds?day=${day}`, name: 'Rounds' }}
      top={<TopLines head={job.customer.name} line={where} />}
      deck={<VisitKeys visit={visit} />}
    >
      <div className="grid gap-9 px-4 pb-12 *:scroll-mt-2">
        <header className="pt-4">
          <p className="lab">
            {momentWords(visit.startsAtMs, zone, nowMs)} to {timeWords(visit.endsAtMs, zone)} ·{' '}
            {visit.technician.name} · {JOB_STATE_WORDS[job.state].toLowerCase()}
          </p>
          <PageHeading className="pt-1.5" title={`Visit to ${job.customer.name}`}>
            {quoted(job.complaint)}
          </PageHeading>
          <Reach job={job} />
          <Callback visit={visit} zone={zone} />
        </header>
        <SafetySection visit={visit} zone={zone} />
        <RunsSection visit={visit} zone={zone} />
        <MachineSection machineId={job.machine.id} zone={zone} />
        <NotesSection visit={visit} zone={zone} />
      </div>
    </SitePage>
  );
}

function Callback({ visit, zone }: { visit: VisitHere; zone: string }) {
  const { callsBack } = visit.job;
  if (!callsBack) return null;
  const days = daysBetween(callsBack.takenAtMs, visit.startsAtMs, zone);
  return (
    <div className="pt-3">
      <CallbackNotice
        head={`Callback, ${days} day${days === 1 ? '' : 's'} after job ${callsBack.number}`}
      >
        <WordLink to={`/jobs/${callsBack.id}`}>See what was done then</WordLink>
      </CallbackNotice>
    </div>
  );
}
