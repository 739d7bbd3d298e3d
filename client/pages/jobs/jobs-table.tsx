import { Link } from 'react-router-dom';
import type { JobListItem } from '#shared/schemas/jobs.ts';
import type { Session } from '#shared/schemas/people.ts';
import { CallGlyphs } from '../../components/glyphs.tsx';
import { LoopArrow } from '../../components/signs.tsx';
import { Table, Td, Th } from '../../components/table.tsx';
import { Spark } from '../../chart/spark.tsx';
import {
  JOB_STATE_WORDS,
  machineWords,
  OUTCOME_WORDS,
  quoted,
  shortName,
} from '../../format/job-words.ts';
import { useNowMs } from '../../format/use-now.ts';
import { dateWords, daysBetween, momentWords } from '../../format/when.ts';
import type { ShownFilter } from './job-filter.ts';

type JobsTableProps = { jobs: JobListItem[]; session: Session; filter: ShownFilter };

const HEADS = [
  'Job',
  'Taken',
  'Customer and place',
  'Machine',
  'Complaint, in the customer’s words',
  'Last run',
  'Calls',
  'State',
  'Technician',
];

export function JobsTable({ jobs, session, filter }: JobsTableProps) {
  return (
    <>
      {jobs.length === 0 ? (
        <p role="status" className="border-t border-print py-5 text-say">
          No job fits that search.
        </p>
      ) : (
        <Table
          caption="Jobs"
          className="max-wide:block max-wide:*:block"
          head={HEADS.map((head) => (
            <Th key={head}>{head}</Th>
          ))}
          headClassName="max-wide:sr-only"
        >
          {jobs.map((job) => (
            <JobRow key={job.id} job={job} zone={session.shop.zone} />
          ))}
        </Table>
      )}
      <p role="status" className="lab pt-3.5">
        {footWords(jobs, filter)}
      </p>
    </>
  );
}

/** "10 open jobs · 3 called back". */
export function footWords(jobs: JobListItem[], filter: ShownFilter) {
  const kind = filter.state === '' ? 'open job' : 'job';
  const callbacks = jobs.filter(({ callsBack }) => callsBack !== null).length;
  const count = `${jobs.length} ${kind}${jobs.length === 1 ? '' : 's'}`;
  return callbacks === 0 ? count : `${count} · ${callbacks} linked to earlier ones`;
}

/** Double rule in the margin: this one calls back an earlier job. */
const CALLBACK_RULE =
  'before:absolute before:inset-y-0 before:-left-3 before:border-l-double before:border-double before:border-ink wide:before:-left-[22px]';

const PLAIN = 'max-wide:block max-wide:border-0 max-wide:p-0';

function JobRow({ job, zone }: { job: JobListItem; zone: string }) {
  const nowMs = useNowMs();
  const { callsBack, lastRun } = job;
  return (
    <tr
      className={`relative max-wide:grid max-wide:grid-cols-[64px_minmax(0,1fr)_auto] max-wide:gap-x-3 max-wide:border-b max-wide:border-print max-wide:py-3 wide:text-[16.5px] wide:leading-[1.28] wide:*:py-[11px] wide:*:align-top ${callsBack ? CALLBACK_RULE : ''}`}
    >
      <Td className={`fig text-[19px] font-semibold ${PLAIN}`}>
        <Link
          to={`/jobs/${job.id}`}
          className="max-wide:-my-2.5 max-wide:inline-flex max-wide:min-h-touch max-wide:items-center wide:-my-2 wide:inline-flex wide:min-h-10 wide:items-center"
        >
          {job.number}
        </Link>
      </Td>
      <Td
        className={`fig whitespace-nowrap max-wide:col-start-1 max-wide:row-start-2 max-wide:text-print ${PLAIN}`}
      >
        {dateWords(job.takenAtMs, zone, nowMs)}
      </Td>
      <Td
        className={`max-wide:col-start-2 max-wide:row-span-2 max-wide:row-start-1 max-wide:text-[18px] ${PLAIN}`}
      >
        <b className="font-bold">{job.customer.name}</b>
        <br />
        <span className="text-print">{job.home.address}</span>
      </Td>
      <Td className="max-wide:hidden">{machineWords(job.machine)}</Td>
      <Td
        className={`font-serif text-[16px] leading-[1.35] font-stretch-[100%] max-wide:col-span-2 max-wide:col-start-2 max-wide:row-start-3 max-wide:pt-1.5 wide:max-w-[290px] ${PLAIN}`}
      >
        {quoted(job.complaint)}
        {callsBack && (
          <p className="flex items-center gap-2 pt-1 font-gothic text-small leading-[1.25] font-semibold font-stretch-[95%]">
            <LoopArrow className="w-6" />
            back after {daysBetween(callsBack.takenAtMs, job.takenAtMs, zone)} days, job{' '}
            {callsBack.number}
          </p>
        )}
      </Td>
      <Td className={`max-wide:col-start-2 max-wide:row-start-4 max-wide:pt-2 ${PLAIN}`}>
        {lastRun ? <Spark card={lastRun} /> : <span className="text-print">no run yet</span>}
      </Td>
      <Td
        className={`max-wide:col-start-3 max-wide:row-start-4 max-wide:pt-1.5 max-wide:text-right ${PLAIN}`}
      >
        {lastRun && (
          <>
            <CallGlyphs calls={lastRun.calls} />
            <br />
            <span className={lastRun.outcome === 'stop' ? 'text-stop' : 'text-print'}>
              {OUTCOME_WORDS[lastRun.outcome]}
            </span>
          </>
        )}
      </Td>
      <Td
        className={`max-wide:col-start-3 max-wide:row-span-2 max-wide:row-start-1 max-wide:text-right ${PLAIN}`}
      >
        <b className="font-bold">{JOB_STATE_WORDS[job.state]}</b>
        <br />
        <span className="text-print">
          {job.nextVisitAtMs !== null && momentWords(job.nextVisitAtMs, zone, nowMs)}
        </span>
      </Td>
      <Td className="whitespace-nowrap max-wide:hidden">
        {job.technicians.map(shortName).join(', ') || (
          <span className="text-print">nobody yet</span>
        )}
      </Td>
    </tr>
  );
}
