import { useQuery } from '@tanstack/react-query';
import type { FittedPart, MachinePage, SpecifiedRating } from '#shared/schemas/homes.ts';
import { machineQuery } from '../../api/machines.ts';
import { WordLink } from '../../components/key-link.tsx';
import { Notice } from '../../components/notice.tsx';
import { SectionHead } from '../../components/section-head.tsx';
import { Failed, Waiting } from '../../components/waiting.tsx';
import { FittedDifferences } from '../../forms/fitted-differences.tsx';
import { machineWords } from '../../format/job-words.ts';
import { RATING_KIND_WORDS, ratedWords } from '../../format/rating-words.ts';
import { dateWords } from '../../format/when.ts';

type MachineSectionProps = { machineId: string; zone: string };

/** What the machine is specified to have, and what is in it now. */
export function MachineSection({ machineId, zone }: MachineSectionProps) {
  const machine = useQuery(machineQuery(machineId));
  const place = machine.data?.place;
  return (
    <section aria-labelledby="machine">
      <SectionHead site id="machine" {...(place && { state: place })}>
        Machine
      </SectionHead>
      {machine.isPending && <Waiting>Fetching the machine…</Waiting>}
      {machine.isError && <Failed error={machine.error} onRetry={machine.refetch} />}
      {machine.data && (
        <MachineFacts machine={machine.data} zone={zone} nowMs={machine.dataUpdatedAt} />
      )}
    </section>
  );
}

type MachineFactsProps = { machine: MachinePage; zone: string; nowMs: number };

function MachineFacts({ machine, zone, nowMs }: MachineFactsProps) {
  const fitted = machine.fitted.filter(({ removedAtMs }) => removedAtMs === null);
  const rated = [
    machine.ratedWatts && `${machine.ratedWatts.toLocaleString('en-US')}\u00a0W`,
    machine.ratedVolts && `${machine.ratedVolts}\u00a0V`,
    machine.serial && `serial ${machine.serial}`,
  ];
  return (
    <>
      <p className="pt-1">
        <WordLink to={`/machines/${machine.id}`}>{machineWords(machine)}</WordLink>
      </p>
      <p className="words text-[1rem] text-print">{rated.filter(Boolean).join(', ')}</p>
      {machine.specified.length === 0 ? (
        <Notice kind="watch" head="No rating is set for this machine." className="mt-3">
          <p>A run shows its points then, and none is judged.</p>
          <WordLink to={`/machines/${machine.id}/specified/high`}>Set its rating</WordLink>
        </Notice>
      ) : (
        <Rows>
          {machine.specified.map((specified) => (
            <Specified key={specified.setting} specified={specified} />
          ))}
        </Rows>
      )}
      {fitted.length > 0 && (
        <Rows>
          {fitted.map((part) => (
            <Fitted key={part.id} part={part} when={dateWords(part.fittedAtMs, zone, nowMs)} />
          ))}
        </Rows>
      )}
      <FittedDifferences machine={machine} className="mt-3" />
    </>
  );
}

function Rows({ children }: { children: React.ReactNode }) {
  return <dl className="mt-2 border-t border-print">{children}</dl>;
}

function Row({ name, value, note }: { name: string; value: string; note: string }) {
  return (
    <div className="grid grid-cols-[minmax(0,2fr)_minmax(0,3fr)] gap-3 border-b border-hair py-2.5">
      <dt className="lab pt-px">{name}</dt>
      <dd className="words text-[1.0625rem] leading-[1.25] font-medium">
        {value}
        {note && <span className="block text-small text-print">{note}</span>}
      </dd>
    </div>
  );
}

function Specified({ specified: { setting, rating, limit } }: { specified: SpecifiedRating }) {
  const limitWords = limit ? `; limit ${limit.name}` : '';
  return (
    <Row
      name={`Specified, ${setting} heat`}
      value={rating.name}
      note={`${ratedWords(rating)}${limitWords}`}
    />
  );
}

function Fitted({ part: { rating, lot, supplier }, when }: { part: FittedPart; when: string }) {
  const from = [supplier, lot && `lot ${lot}`].filter(Boolean).join(', ');
  return (
    <Row
      name={`Fitted, ${RATING_KIND_WORDS[rating.kind].toLowerCase()}`}
      value={rating.name}
      note={[`since ${when}`, from].filter(Boolean).join('; ')}
    />
  );
}
