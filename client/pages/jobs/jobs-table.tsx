import { Link } from 'react-router-dom';
import type { JobListItem } from '#shared/schemas/jobs.ts';
import type { RunCard } from '#shared/schemas/runs.ts';
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

/** Double rule in the margin, of the whole row on a phone, at its first cell on a desk. */
const RULE_ON_PHONE =
  'max-wide:before:absolute max-wide:before:inset-y-0 max-wide:before:-left-3 max-wide:before:border-l-twin max-wide:before:border-double max-wide:before:border-ink';
const RULE_ON_DESK =
  'wide:relative wide:before:absolute wide:before:inset-y-0 wide:before:-left-[22px] wide:before:border-l-[8px] wide:before:border-double wide:before:border-ink';

const CELL = 'max-wide:block max-wide:border-0 max-wide:p-0';
const IN_LINE = '-my-2.5 inline-flex min-h-touch items-center wide:-my-2 wide:min-h-10';

function JobRow({ job, zone }: { job: JobListItem; zone: string }) {
  const nowMs = useNowMs();
  const isCallback = job.callsBack !== null;
  return (
    <tr
      className={`relative max-wide:grid max-wide:grid-cols-[64px_minmax(0,1fr)_auto] max-wide:gap-x-3 max-wide:border-b max-wide:border-print max-wide:py-3 wide:static wide:text-[1.03125rem] wide:leading-[1.28] wide:*:py-[11px] wide:*:align-top ${isCallback ? RULE_ON_PHONE : ''}`}
    >
      <Td
        className={`fig text-[1.1875rem] font-semibold ${CELL} ${isCallback ? RULE_ON_DESK : ''}`}
      >
        <Link to={`/jobs/${job.id}`} className={IN_LINE}>
          {job.number}
        </Link>
      </Td>
      <Td
        className={`fig whitespace-nowrap max-wide:col-start-1 max-wide:row-start-2 max-wide:text-print ${CELL}`}
      >
        {dateWords(job.takenAtMs, zone, nowMs)}
      </Td>
      <Td
        className={`max-wide:col-start-2 max-wide:row-span-2 max-wide:row-start-1 max-wide:text-[1.125rem] wide:whitespace-nowrap ${CELL}`}
      >
        <b className="font-bold">{job.customer.name}</b>
        <br />
        <span className="text-print">{job.home.address}</span>
      </Td>
      <Td className="max-wide:hidden">{machineWords(job.machine)}</Td>
      <ComplaintCell job={job} zone={zone} />
      <RunCells run={job.lastRun} />
      <StateCell job={job} zone={zone} nowMs={nowMs} />
      <Td className="whitespace-nowrap max-wide:hidden">
        {job.technicians.map(shortName).join(', ') || (
          <span className="text-print">nobody yet</span>
        )}
      </Td>
    </tr>
  );
}

function ComplaintCell({ job: { complaint, callsBack, takenAtMs }, zone }: JobCellProps) {
  return (
    <Td
      className={`font-serif text-[1rem] leading-[1.35] font-stretch-[100%] max-wide:col-span-2 max-wide:col-start-2 max-wide:row-start-3 max-wide:pt-1.5 wide:max-w-[300px] wide:min-w-[180px] ${CELL}`}
    >
      {quoted(complaint)}
      {callsBack && (
        <p className="flex items-center gap-2 pt-1 font-gothic text-small leading-[1.25] font-semibold font-stretch-[95%]">
          <LoopArrow className="w-6" />
          back after {daysBetween(callsBack.takenAtMs, takenAtMs, zone)} days, job{' '}
          {callsBack.number}
        </p>
      )}
    </Td>
  );
}

type JobCellProps = { job: JobListItem; zone: string };

/** The last run as a spark, then its calls over its outcome. */
function RunCells({ run }: { run: RunCard | null }) {
  return (
    <>
      <Td className={`max-wide:col-start-2 max-wide:row-start-4 max-wide:pt-2 ${CELL}`}>
        {run ? <Spark card={run} /> : <span className="text-print">no run yet</span>}
      </Td>
      <Td
        className={`max-wide:col-start-3 max-wide:row-start-4 max-wide:pt-1.5 max-wide:text-right wide:whitespace-nowrap ${CELL}`}
      >
        {run && (
          <>
            <CallGlyphs calls={run.calls} />
            <br />
            <span className={run.outcome === 'stop' ? 'text-stop' : 'text-print'}>
              {OUTCOME_WORDS[run.outcome]}
            </span>
          </>
        )}
      </Td>
    </>
  );
}

function StateCell({ job, zone, nowMs }: JobCellProps & { nowMs: number }) {
  return (
    <Td
      className={`max-wide:col-start-3 max-wide:row-span-2 max-wide:row-start-1 max-wide:text-right wide:whitespace-nowrap ${CELL}`}
    >
      <b className="font-bold">{JOB_STATE_WORDS[job.state]}</b>
      <br />
      <span className="text-print">
        {job.nextVisitAtMs !== null && momentWords(job.nextVisitAtMs, zone, nowMs)}
      </span>
    </Td>
  );
}
