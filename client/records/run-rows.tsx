import { Link } from 'react-router-dom';
import type { RunCard } from '#shared/schemas/runs.ts';
import { Spark } from '../chart/spark.tsx';
import { CallGlyphs } from '../components/glyphs.tsx';
import { OUTCOME_WORDS } from '../format/job-words.ts';
import { momentWords, spanWords } from '../format/when.ts';
import { HEADLINE_WORDS } from './headline-words.ts';

type RunRowsProps = { runs: RunCard[]; zone: string; nowMs: number };

/** Runs in a list: what each was, its spark, what came of it. */
export function RunRows({ runs, zone, nowMs }: RunRowsProps) {
  return (
    <ul>
      {runs.map((run) => (
        <li
          key={run.id}
          className="grid grid-cols-[minmax(0,1fr)_auto] items-center gap-x-3 gap-y-1 border-b border-hair py-2 desk:grid-cols-[minmax(0,1fr)_134px_180px]"
        >
          <p className="words text-small leading-[1.25] text-print">
            <Link
              to={`/runs/${run.id}`}
              className="inline-flex min-h-touch items-center text-[1.125rem] leading-[1.2] font-semibold text-ink desk:min-h-10"
            >
              {run.label}
            </Link>
            <br />
            {momentWords(run.startedAtMs, zone, nowMs)} · {spanWords(run.durationS)} long
          </p>
          <Spark card={run} className="max-desk:row-start-2" />
          <p className="words text-right text-small leading-[1.3] desk:text-left">
            <CallGlyphs calls={run.calls} />
            <br />
            <b className={`text-[1.0625rem] ${run.outcome === 'stop' ? 'text-stop' : ''}`}>
              {OUTCOME_WORDS[run.outcome]}
            </b>
            <span className="text-print">, {HEADLINE_WORDS[run.headline]}</span>
          </p>
        </li>
      ))}
    </ul>
  );
}
