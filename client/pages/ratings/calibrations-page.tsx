import { useQuery } from '@tanstack/react-query';
import { useParams } from 'react-router-dom';
import { probeOf } from '#shared/judging/judged-by.ts';
import { calibrationCorrection, calibrationU } from '#shared/probes/calibrate-probe.ts';
import { datedCalibration } from '#shared/probes/calibration-record.ts';
import { isSetAside, JUDGED_ABOUT_C, probeInUse } from '#shared/probes/probe-in-use.ts';
import type { StoredCalibration } from '#shared/schemas/calibrations.ts';
import type { StoredProbe } from '#shared/schemas/ratings.ts';
import { formatRated, formatStep } from '#shared/wording/format.ts';
import { calibrationsQuery } from '../../api/calibrations.ts';
import { probesQuery } from '../../api/probes.ts';
import { Crumb } from '../../components/crumb.tsx';
import { DeskPage } from '../../components/frame.tsx';
import { KeyLink } from '../../components/key-link.tsx';
import { NothingHere } from '../../components/nothing-here.tsx';
import { Notice } from '../../components/notice.tsx';
import { PageHeading } from '../../components/page-heading.tsx';
import { SectionHead } from '../../components/section-head.tsx';
import { UnfetchedPage } from '../../components/waiting.tsx';
import {
  addsWords,
  CALIBRATION_KIND_WORDS,
  standingWords,
} from '../../format/calibration-words.ts';
import { useNowMs } from '../../format/use-now.ts';
import { dateWords } from '../../format/when.ts';
import { mayRunOffice, useSession } from '../frame/session-context.ts';
import { CalibrationResult } from './calibration-result.tsx';

export function CalibrationsPage() {
  const { id = '' } = useParams();
  const probes = useQuery(probesQuery());
  const calibrations = useQuery(calibrationsQuery());
  if (!probes.data) return <UnfetchedPage noun="probe" query={probes} />;
  if (!calibrations.data) return <UnfetchedPage noun="list of calibrations" query={calibrations} />;
  const probe = probes.data.find((each) => each.id === id);
  const own = calibrations.data.filter(({ probeId }) => probeId === id);
  return probe ? <Calibrations probe={probe} calibrations={own} /> : <NothingHere />;
}

type CalibrationsProps = { probe: StoredProbe; calibrations: StoredCalibration[] };

function Calibrations({ probe, calibrations }: CalibrationsProps) {
  const mayChange = mayRunOffice(useSession());
  const nowMs = useNowMs();
  const inUse = probeInUse(probeOf(probe), calibrations.map(datedCalibration), nowMs);
  const newest = calibrations.find(({ id }) => id === inUse.calibration?.id);
  return (
    <DeskPage>
      <Crumb to="/ratings">Ratings</Crumb>
      <div className="flex flex-wrap items-end justify-between gap-3 pb-5">
        <PageHeading>{`Calibrations of ${probe.name}`}</PageHeading>
        {mayChange && (
          <KeyLink to={`/probes/${probe.id}/calibrations/new`} face="main">
            Record a calibration
          </KeyLink>
        )}
      </div>
      {newest && inUse.calibration ? (
        <InForce calibration={newest} standing={inUse.calibration.standing} />
      ) : (
        <p className="max-w-read text-say">
          None yet. Runs are judged on its readings as they are, within the accuracy that its maker
          states. Ice and boiling water make a calibration, and so does a good thermometer beside
          it.
        </p>
      )}
      {calibrations.length > 0 && <History calibrations={calibrations} />}
    </DeskPage>
  );
}

type InForceProps = {
  calibration: StoredCalibration;
  standing: Parameters<typeof standingWords>[0];
};

function InForce({ calibration, standing }: InForceProps) {
  const { zone } = useSession().shop;
  const nowMs = useNowMs();
  const due = dateWords(datedCalibration(calibration).dueAtMs, zone, nowMs);
  const head = isSetAside(standing) ? 'Not used' : 'In use';
  return (
    <section aria-labelledby="in-force">
      <SectionHead id="in-force" state={head}>
        {CALIBRATION_KIND_WORDS[calibration.kind]}, {dateWords(calibration.madeAtMs, zone, nowMs)}
      </SectionHead>
      {standing === 'current' ? (
        <p className="pt-3 text-body">{standingWords(standing, due)}</p>
      ) : (
        <Notice kind="watch" className="mt-3 mb-4">
          {standingWords(standing, due)}
        </Notice>
      )}
      <CalibrationResult calibration={calibration} />
    </section>
  );
}

function History({ calibrations }: { calibrations: StoredCalibration[] }) {
  const newestFirst = [...calibrations].reverse();
  return (
    <section aria-labelledby="history" className="pt-11">
      <SectionHead id="history" state={`${calibrations.length} in all`}>
        All of them
      </SectionHead>
      <ul>
        {newestFirst.map((calibration, i) => (
          <HistoryRow
            key={calibration.id}
            calibration={calibration}
            before={newestFirst[i + 1] ?? null}
          />
        ))}
      </ul>
    </section>
  );
}

type HistoryRowProps = { calibration: StoredCalibration; before: StoredCalibration | null };

/** What it adds, how well that is known, and how far the probe moved since the one before. */
function HistoryRow({ calibration, before }: HistoryRowProps) {
  const { zone } = useSession().shop;
  const nowMs = useNowMs();
  const { kind, unit, madeAtMs, referenceName, notes } = calibration;
  const addedK = addedByK(calibration);
  const uK = calibrationU(datedCalibration(calibration).result, 0, JUDGED_ABOUT_C);
  return (
    <li className="words border-b border-hair py-2.5 text-[1rem] leading-[1.35]">
      <p className="text-[1.125rem] font-semibold">{dateWords(madeAtMs, zone, nowMs)}</p>
      <p>
        {CALIBRATION_KIND_WORDS[kind]}
        {referenceName !== '' && `, ${referenceName}`}: near {formatRated(JUDGED_ABOUT_C, unit)} it{' '}
        {addsWords(addedK, unit)}, within ±{'\u00a0'}
        {formatStep(uK, unit)} that day.
      </p>
      {before && (
        <p className="text-print">
          Moved by {formatStep(Math.abs(addedK - addedByK(before)), unit)} since the one before.
        </p>
      )}
      {notes !== '' && <p className="text-print">{notes}</p>}
    </li>
  );
}

function addedByK(calibration: StoredCalibration): number {
  return calibrationCorrection(datedCalibration(calibration).result, JUDGED_ABOUT_C);
}
