import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import type { StoredCalibration } from '#shared/schemas/calibrations.ts';
import { RATING_KINDS, type StoredProbe, type StoredRating } from '#shared/schemas/ratings.ts';
import { calibrationsQuery } from '../../api/calibrations.ts';
import { probesQuery } from '../../api/probes.ts';
import { ratingsQuery } from '../../api/ratings.ts';
import { DeskPage } from '../../components/frame.tsx';
import { KeyLink } from '../../components/key-link.tsx';
import { PageHeading } from '../../components/page-heading.tsx';
import { Empty } from '../../components/printed-paper.tsx';
import { SectionHead } from '../../components/section-head.tsx';
import { Table, Td, Th } from '../../components/table.tsx';
import { Failed, Waiting } from '../../components/waiting.tsx';
import { band, RATING_KIND_WORDS, unitWords } from '../../format/rating-words.ts';
import { mayRunOffice, useSession } from '../frame/session-context.ts';
import { ProbeRows } from './probe-rows.tsx';

export function RatingsPage() {
  const mayChange = mayRunOffice(useSession());
  const ratings = useQuery(ratingsQuery());
  const probes = useQuery(probesQuery());
  const calibrations = useQuery(calibrationsQuery());
  return (
    <DeskPage>
      <div className="flex flex-wrap items-end justify-between gap-3 pb-5">
        <div>
          <PageHeading>Ratings</PageHeading>
          <p className="max-w-read pt-1.5 text-say">
            What thermostats, limits, cut-offs and fuses are rated to do. The sheet inside the
            machine outranks this page.
          </p>
        </div>
        {mayChange && (
          <KeyLink to="/ratings/new" face="main">
            Add a rating
          </KeyLink>
        )}
      </div>
      {ratings.isPending && <Waiting>Fetching the ratings…</Waiting>}
      {ratings.isError && <Failed error={ratings.error} onRetry={ratings.refetch} />}
      {ratings.data && <Ratings ratings={ratings.data} mayChange={mayChange} />}
      <div className="pt-11">
        {probes.isPending && <Waiting>Fetching the probes…</Waiting>}
        {probes.isError && <Failed error={probes.error} onRetry={probes.refetch} />}
        {probes.data && (
          <Probes
            probes={probes.data}
            calibrations={calibrations.data ?? []}
            mayChange={mayChange}
          />
        )}
      </div>
    </DeskPage>
  );
}

type RatingsProps = { ratings: StoredRating[]; mayChange: boolean };

function Ratings({ ratings, mayChange }: RatingsProps) {
  if (ratings.length === 0) {
    return (
      <Empty head="No rating yet.">
        <p>
          A run is judged by the thermostat that its machine is specified to have: where it opens,
          where it closes, and how far the air may run past both.
        </p>
      </Empty>
    );
  }
  return (
    <Table
      caption="Ratings"
      headClassName="max-desk:sr-only"
      className="max-desk:block max-desk:*:block"
      head={
        <>
          <Th>Part</Th>
          <Th>Kind</Th>
          <Th figure>Opens</Th>
          <Th figure>Closes</Th>
          <Th figure>Air may run past, over and under</Th>
        </>
      }
    >
      {RATING_KINDS.flatMap((kind) =>
        ratings
          .filter((rating) => rating.kind === kind)
          .map((rating) => <RatingRow key={rating.id} rating={rating} mayChange={mayChange} />),
      )}
    </Table>
  );
}

const CELL = 'max-desk:block max-desk:border-0 max-desk:p-0 max-desk:text-left';

function RatingRow({ rating, mayChange }: { rating: StoredRating; mayChange: boolean }) {
  const unit = unitWords(rating.unit);
  const closes = rating.closes !== null && band(rating.closes, rating.closesTol ?? 0);
  return (
    <tr className="max-desk:grid max-desk:grid-cols-2 max-desk:gap-x-4 max-desk:border-b max-desk:border-hair max-desk:py-2">
      <Td className={`text-[1.125rem] font-semibold max-desk:col-span-2 ${CELL}`}>
        {mayChange ? (
          <Link
            to={`/ratings/${rating.id}`}
            className="inline-flex min-h-touch items-center desk:-my-2 desk:min-h-10"
          >
            {rating.name}
          </Link>
        ) : (
          <span className="inline-flex items-center">{rating.name}</span>
        )}
      </Td>
      <Td className={`max-desk:col-span-2 max-desk:text-print ${CELL}`}>
        {RATING_KIND_WORDS[rating.kind]}
      </Td>
      <Td figure className={CELL}>
        <span className="text-print desk:hidden">opens </span>
        {band(rating.opens, rating.opensTol)}
        {'\u00a0'}
        {unit}
      </Td>
      <Td figure className={CELL}>
        {closes ? (
          <>
            <span className="text-print desk:hidden">closes </span>
            {closes}
            {'\u00a0'}
            {unit}
          </>
        ) : (
          <span className="text-print">does not close</span>
        )}
      </Td>
      <Td figure className={`max-desk:hidden ${CELL}`}>
        {rating.overshoot}, {rating.undershoot}
        {'\u00a0'}
        {unit}
      </Td>
    </tr>
  );
}

type ProbesProps = {
  probes: StoredProbe[];
  calibrations: StoredCalibration[];
  mayChange: boolean;
};

function Probes({ probes, calibrations, mayChange }: ProbesProps) {
  return (
    <section>
      <SectionHead state="their accuracy decides what can be called">Probes</SectionHead>
      {probes.length === 0 && (
        <p className="max-w-read pt-3 text-say">
          No probe yet. Without one a run is judged as if its readings were exact.
        </p>
      )}
      <ProbeRows probes={probes} calibrations={calibrations} mayChange={mayChange} />
      {mayChange && (
        <div className="pt-5">
          <KeyLink to="/probes/new">Add a probe</KeyLink>
        </div>
      )}
    </section>
  );
}
