import { Link } from 'react-router-dom';
import type { RoundsItem } from '#shared/schemas/jobs.ts';
import { KeyLink } from '../../components/key-link.tsx';
import { CallbackNotice } from '../../components/notice.tsx';
import { JOB_STATE_WORDS, machineWords, quoted } from '../../format/job-words.ts';
import { daysBetween, timeWords } from '../../format/when.ts';
import { Reach } from './reach.tsx';
import { isDone, runsWords } from './rounds-words.ts';

type RoundStopProps = {
  visit: RoundsItem;
  zone: string;
  isNext: boolean;
  /** Under a technician's name where the list holds several technicians. */
  heading: 'h2' | 'h3';
};

/** One visit of the day: the clock in the margin, what it is about, how to reach it. */
export function RoundStop({ visit, zone, isNext, heading: Heading }: RoundStopProps) {
  const { job } = visit;
  const done = isDone(visit);
  const ink = done ? 'text-print' : 'text-ink';
  return (
    <li
      className={`grid grid-cols-[96px_minmax(0,1fr)] pt-3.5 pr-4 pb-1 ${isNext ? 'border-t-bar border-ink bg-strip' : 'border-t border-print'}`}
    >
      <p className={`fig pt-2.5 pl-4 text-[1.5625rem] leading-none font-semibold ${ink}`}>
        {timeWords(visit.startsAtMs, zone)}
        <span className="block pt-[7px] text-[1rem] font-normal text-print">
          to {timeWords(visit.endsAtMs, zone)}
        </span>
      </p>
      <div className="min-w-0">
        <Heading className={`text-figure leading-[1.15] font-stretch-[97%] ${ink}`}>
          <Link
            to={`/visits/${visit.id}`}
            className="inline-flex min-h-touch items-center font-gothic decoration-1 underline-offset-[.2em]"
          >
            {job.customer.name}
          </Link>
        </Heading>
        <p className="words text-[1rem] leading-[1.3] font-medium text-print">
          {machineWords(job.machine)}
        </p>
        <p className="pt-[5px] text-[1.0625rem] leading-[1.35]">{quoted(job.complaint)}</p>
        <StopState visit={visit} />
        <Callback visit={visit} zone={zone} />
        {isNext && (
          <KeyLink
            to={`/visits/${visit.id}`}
            face="main"
            size="site"
            className="mt-3 w-full"
            aria-label={`Open the visit to ${job.customer.name}`}
          >
            Open the visit
          </KeyLink>
        )}
        <Reach job={job} />
      </div>
    </li>
  );
}

/** Where the job stands, once it is more than booked; and the runs that were made here. */
function StopState({ visit }: { visit: RoundsItem }) {
  const runs = runsWords(visit.runs);
  const state = visit.job.state === 'booked' ? null : JOB_STATE_WORDS[visit.job.state];
  const words = [state, runs].filter(Boolean).join('. ');
  return words && <p className="lab pt-1.5">{words}.</p>;
}

function Callback({ visit, zone }: { visit: RoundsItem; zone: string }) {
  const { callsBack } = visit.job;
  if (!callsBack) return null;
  const days = daysBetween(callsBack.takenAtMs, visit.startsAtMs, zone);
  return (
    <div className="mt-3 mb-1">
      <CallbackNotice
        head={`Callback, ${days} day${days === 1 ? '' : 's'} after job ${callsBack.number}`}
      >
        {visit.before && <p>Last time: {visit.before}</p>}
      </CallbackNotice>
    </div>
  );
}
