import { Link } from 'react-router-dom';
import type { VisitPage } from '#shared/schemas/jobs.ts';
import type { RunCard } from '#shared/schemas/runs.ts';
import { Spark } from '../../chart/spark.tsx';
import { CallGlyphs } from '../../components/glyphs.tsx';
import { KeyLink } from '../../components/key-link.tsx';
import { SectionHead } from '../../components/section-head.tsx';
import { OUTCOME_WORDS } from '../../format/job-words.ts';
import { timeWords } from '../../format/when.ts';
import { RunningRun } from '../../records/running-run.tsx';

type RunsSectionProps = { visit: VisitPage; zone: string };

/** The runs of this visit, oldest first, and the key that adds one. */
export function RunsSection({ visit, zone }: RunsSectionProps) {
  const runs = [...visit.runs].sort((a, b) => a.startedAtMs - b.startedAtMs);
  return (
    <section aria-labelledby="runs">
      <SectionHead
        site
        id="runs"
        state={runs.length === 0 ? 'none yet' : `${runs.length} recorded`}
      >
        Runs
      </SectionHead>
      {runs.length === 0 ? (
        <p className="py-3 text-body">
          A run of about 15 minutes shows three cycles; that is enough to judge it.
        </p>
      ) : (
        <ul>
          {runs.map((run) => (
            <RunRow key={run.id} run={run} zone={zone} />
          ))}
        </ul>
      )}
      {visit.mayRecord ? (
        <>
          <RunningRun visitId={visit.id} />
          <div className="mt-3.5 grid gap-2.5">
            <KeyLink
              to={`/visits/${visit.id}/stopwatch`}
              reloadDocument
              face={runs.length === 0 ? 'main' : 'plain'}
              size="site"
            >
              Take a run by stopwatch
            </KeyLink>
            <KeyLink to={`/visits/${visit.id}/upload`} size="site">
              Upload a probe file
            </KeyLink>
          </div>
        </>
      ) : (
        <p className="pt-3 text-small text-print">
          Runs are recorded by {visit.technician.name}, whose visit this is.
        </p>
      )}
    </section>
  );
}

function RunRow({ run, zone }: { run: RunCard; zone: string }) {
  const isStop = run.outcome === 'stop';
  return (
    <li className="border-b border-hair">
      <Link
        to={`/runs/${run.id}`}
        className="words grid min-h-pad grid-cols-[minmax(0,1fr)_132px_minmax(76px,auto)] items-center gap-3 py-2 text-[0.9375rem] leading-[1.25] font-medium no-underline max-[370px]:grid-cols-[minmax(0,1fr)_auto]"
      >
        <span>
          <b className="block text-[1.125rem] font-semibold underline decoration-1 underline-offset-[.2em]">
            {run.label}
          </b>
          <span className="text-print">{timeWords(run.startedAtMs, zone)}</span>
        </span>
        <Spark card={run} className="max-[370px]:col-span-2 max-[370px]:row-start-2" />
        <span>
          <b className={`block text-[1.125rem] font-semibold ${isStop ? 'text-stop' : ''}`}>
            {isStop ? 'Stop' : OUTCOME_WORDS[run.outcome]}
          </b>
          <CallGlyphs calls={run.calls} most={5} />
        </span>
      </Link>
    </li>
  );
}
