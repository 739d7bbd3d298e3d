import { Link } from 'react-router-dom';
import type { JobPage } from '#shared/schemas/jobs.ts';
import { useNowMs } from '../../format/use-now.ts';
import { dayWords, timeWords } from '../../format/when.ts';
import { RunRows } from '../../records/run-rows.tsx';

type VisitWithRuns = JobPage['visits'][number];

/** Visits, newest first, each with the runs made on it. */
export function Timeline({ visits, zone }: { visits: VisitWithRuns[]; zone: string }) {
  return (
    <ol>
      {visits.map((visit) => (
        <VisitEntry key={visit.id} visit={visit} zone={zone} />
      ))}
    </ol>
  );
}

function VisitEntry({ visit, zone }: { visit: VisitWithRuns; zone: string }) {
  const nowMs = useNowMs();
  const isAhead = visit.startsAtMs > nowMs;
  return (
    <li className="grid gap-x-6 border-b border-print py-3 desk:grid-cols-[120px_minmax(0,1fr)]">
      <p className="fig flex items-baseline gap-3 text-[1.25rem] leading-[1.2] font-semibold desk:block desk:pt-2.5">
        {dayWords(visit.startsAtMs, zone, nowMs)}
        <span className="block text-[1rem] font-normal text-print desk:pt-1">
          {timeWords(visit.startsAtMs, zone)} to {timeWords(visit.endsAtMs, zone)}
        </span>
      </p>
      <div>
        <h3 className="words text-[1.125rem] font-semibold">
          <Link
            to={`/visits/${visit.id}`}
            className="inline-flex min-h-touch items-center desk:min-h-10"
          >
            {isAhead ? 'Visit by' : 'Visited by'} {visit.technician.name}
          </Link>
        </h3>
        {visit.notes && <p className="max-w-read pb-1">{visit.notes}</p>}
        {visit.runs.length > 0 ? (
          <RunRows runs={visit.runs} zone={zone} nowMs={nowMs} />
        ) : (
          <p className="words text-print">no run yet</p>
        )}
      </div>
    </li>
  );
}
