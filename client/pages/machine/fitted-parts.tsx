import type { FittedPart, MachinePage } from '#shared/schemas/homes.ts';
import { FittedDifferences } from '../../forms/fitted-differences.tsx';
import { KeyLink, WordLink } from '../../components/key-link.tsx';
import { SectionHead } from '../../components/section-head.tsx';
import { RATING_KIND_WORDS, ratedWords } from '../../format/rating-words.ts';
import { useNowMs } from '../../format/use-now.ts';
import { dateWords } from '../../format/when.ts';
import { useSession } from '../frame/session-context.ts';

/** What is in the machine, what came out, and where that differs from what should be in it. */
export function FittedParts({ machine }: { machine: MachinePage }) {
  const inPlace = machine.fitted.filter(({ removedAtMs }) => removedAtMs === null);
  const removed = machine.fitted.filter(({ removedAtMs }) => removedAtMs !== null);
  return (
    <section>
      <SectionHead
        state={inPlace.length === 0 ? 'none written down' : `${inPlace.length} in place`}
      >
        Fitted parts
      </SectionHead>
      <FittedDifferences machine={machine} className="my-3 max-w-form" />
      <ul>
        {[...inPlace, ...removed].map((part) => (
          <PartRow key={part.id} part={part} machineId={machine.id} />
        ))}
      </ul>
      <div className="pt-5">
        <KeyLink to={`/machines/${machine.id}/parts/new`}>Fit a part</KeyLink>
      </div>
    </section>
  );
}

function PartRow({ part, machineId }: { part: FittedPart; machineId: string }) {
  const { zone } = useSession().shop;
  const nowMs = useNowMs();
  const { rating, removedAtMs } = part;
  const isOut = removedAtMs !== null;
  const from = [part.supplier && `from ${part.supplier}`, part.lot && `lot ${part.lot}`];
  return (
    <li className="words grid grid-cols-[minmax(0,1fr)_auto] items-center gap-x-6 border-b border-hair py-2 desk:grid-cols-[minmax(0,1fr)_minmax(0,1fr)_minmax(0,1fr)_90px]">
      <p>
        <b className={`text-[1.125rem] font-semibold ${isOut ? 'line-through decoration-2' : ''}`}>
          {rating.name}
        </b>
        <br />
        <span className="text-print">{RATING_KIND_WORDS[rating.kind]}</span>
      </p>
      <p className="max-desk:col-start-1">
        {ratedWords(rating)}
        <br />
        <span className="text-print">
          {from.filter(Boolean).join(', ') || 'supplier not known'}
        </span>
      </p>
      <p className="max-desk:col-start-1">
        fitted {dateWords(part.fittedAtMs, zone, nowMs)}
        {removedAtMs !== null && (
          <>
            , out {dateWords(removedAtMs, zone, nowMs)}
            <br />
            <span className="text-print">{part.removedWhy}</span>
          </>
        )}
      </p>
      {!isOut && (
        <WordLink
          to={`/machines/${machineId}/parts/${part.id}/out`}
          aria-label={`Take out ${rating.name}`}
          className="max-desk:col-start-2 max-desk:row-start-1"
        >
          Take out
        </WordLink>
      )}
    </li>
  );
}
