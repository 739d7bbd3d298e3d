import { useQuery } from '@tanstack/react-query';
import { Link, useParams } from 'react-router-dom';
import type { JobPage as Job } from '#shared/schemas/jobs.ts';
import { jobQuery } from '../../api/jobs.ts';
import { Fact, Facts } from '../../components/facts.tsx';
import { DeskPage } from '../../components/frame.tsx';
import { KeyLink } from '../../components/key-link.tsx';
import { CallbackNotice } from '../../components/notice.tsx';
import { PageHeading } from '../../components/page-heading.tsx';
import { SectionHead } from '../../components/section-head.tsx';
import { Failed, Waiting } from '../../components/waiting.tsx';
import { JOB_STATE_WORDS, machineWords, quoted } from '../../format/job-words.ts';
import { useNowMs } from '../../format/use-now.ts';
import { dateWords, daysBetween } from '../../format/when.ts';
import { mayRunOffice, useSession } from '../frame/session-context.ts';
import { StateForm } from './state-form.tsx';
import { Timeline } from './timeline.tsx';

export function JobPage() {
  const { id = '' } = useParams();
  const job = useQuery(jobQuery(id));

  if (job.isPending) {
    return (
      <DeskPage>
        <Waiting>Fetching the job…</Waiting>
      </DeskPage>
    );
  }
  if (job.isError) {
    return (
      <DeskPage>
        <PageHeading>Job</PageHeading>
        <Failed error={job.error} onRetry={job.refetch} />
      </DeskPage>
    );
  }
  return <JobSheet job={job.data} />;
}

function JobSheet({ job }: { job: Job }) {
  const session = useSession();
  const mayBook = mayRunOffice(session);
  const bookTo = `/jobs/${job.id}/visits/new`;
  return (
    <DeskPage>
      <TitleBlock job={job} zone={session.shop.zone} />
      <div className="grid items-start gap-x-16 gap-y-9 pt-7 wide:grid-cols-[minmax(0,1fr)_340px]">
        <section>
          <SectionHead state={countWords(job.visits.length)}>Visits and runs</SectionHead>
          {job.visits.length === 0 && (
            <p className="max-w-read pt-3 pb-4 text-say">
              No visit is booked. {mayBook ? '' : 'The office books one.'}
            </p>
          )}
          <Timeline visits={job.visits} zone={session.shop.zone} />
          {mayBook && (
            <div className="pt-5">
              <KeyLink to={bookTo} face={job.visits.length === 0 ? 'main' : 'plain'}>
                Book a visit
              </KeyLink>
            </div>
          )}
        </section>
        <StateForm job={job} />
      </div>
    </DeskPage>
  );
}

/** A link among facts: as high as a finger, without parting the lines. */
const IN_LINE = '-my-3 inline-flex min-h-touch items-center desk:-my-2 desk:min-h-10';

function countWords(count: number) {
  return count === 1 ? '1 visit' : `${count} visits`;
}

function TitleBlock({ job, zone }: { job: Job; zone: string }) {
  const nowMs = useNowMs();
  const { callsBack, customer, home, machine } = job;
  return (
    <>
      <div className="grid items-end gap-x-14 gap-y-4 wide:grid-cols-[minmax(0,1fr)_auto]">
        <div>
          <p className="lab">
            Job {job.number} · taken {dateWords(job.takenAtMs, zone, nowMs)} ·{' '}
            {JOB_STATE_WORDS[job.state].toLowerCase()}
          </p>
          <PageHeading title={`Job ${job.number}`} className="pt-1.5">
            {quoted(job.complaint)}
          </PageHeading>
        </div>
        <Facts>
          <Fact name="Customer">
            {customer.name}
            {customer.phone && (
              <>
                <br />
                <PhoneLink phone={customer.phone} />
              </>
            )}
          </Fact>
          <Fact name="Where">
            <Link to={`/homes/${home.id}`} className={IN_LINE}>
              {home.address}
            </Link>
            {home.town && (
              <>
                <br />
                {home.town}
              </>
            )}
          </Fact>
          <Fact name="Machine">
            <Link to={`/machines/${machine.id}`} className={IN_LINE}>
              {machineWords(machine)}
            </Link>
            {machine.serial && (
              <>
                <br />
                serial {machine.serial}
              </>
            )}
          </Fact>
        </Facts>
      </div>
      {callsBack && (
        <div className="max-w-form pt-6">
          <CallbackNotice
            head={`Callback, ${daysBetween(callsBack.takenAtMs, job.takenAtMs, zone)} days`}
          >
            <Link to={`/jobs/${callsBack.id}`} className="word">
              Job {callsBack.number}, taken {dateWords(callsBack.takenAtMs, zone, nowMs)}
            </Link>
          </CallbackNotice>
        </div>
      )}
    </>
  );
}

function PhoneLink({ phone }: { phone: string }) {
  return (
    <a href={`tel:${phone.replaceAll(/[^+\d]/g, '')}`} className={`fig ${IN_LINE}`}>
      {phone}
    </a>
  );
}
