import { Link } from 'react-router-dom';
import { probeOf } from '#shared/judging/judged-by.ts';
import { datedCalibration } from '#shared/probes/calibration-record.ts';
import { probeInUse, type CalibrationStanding } from '#shared/probes/probe-in-use.ts';
import type { StoredCalibration } from '#shared/schemas/calibrations.ts';
import type { StoredProbe } from '#shared/schemas/ratings.ts';
import { PROBE_KIND_WORDS, unitWords } from '../../format/rating-words.ts';
import { useNowMs } from '../../format/use-now.ts';
import { dateWords } from '../../format/when.ts';
import { useSession } from '../frame/session-context.ts';

type ProbeRowsProps = {
  probes: StoredProbe[];
  calibrations: StoredCalibration[];
  mayChange: boolean;
};

export function ProbeRows({ probes, calibrations, mayChange }: ProbeRowsProps) {
  return (
    <ul>
      {probes.map((probe) => (
        <ProbeRow
          key={probe.id}
          probe={probe}
          calibrations={calibrations.filter(({ probeId }) => probeId === probe.id)}
          mayChange={mayChange}
        />
      ))}
    </ul>
  );
}

type ProbeRowProps = {
  probe: StoredProbe;
  calibrations: StoredCalibration[];
  mayChange: boolean;
};

function ProbeRow({ probe, calibrations, mayChange }: ProbeRowProps) {
  const { zone } = useSession().shop;
  const nowMs = useNowMs();
  const unit = unitWords(probe.unit);
  const { responseS, calibratedAtMs, calibrationU } = probe;
  const certificate =
    calibratedAtMs === null ? null : `certificate of ${dateWords(calibratedAtMs, zone, nowMs)}`;
  return (
    <li className="words grid items-center gap-x-6 border-b border-hair py-1 desk:grid-cols-[minmax(0,1.1fr)_minmax(0,1fr)_minmax(0,1.6fr)]">
      <p className="text-[1.125rem] font-semibold">
        {mayChange ? (
          <Link
            to={`/probes/${probe.id}`}
            className="inline-flex min-h-touch items-center desk:min-h-10"
          >
            {probe.name}
          </Link>
        ) : (
          <span className="inline-flex min-h-10 items-center">{probe.name}</span>
        )}
      </p>
      <p>{PROBE_KIND_WORDS[probe.kind]}</p>
      <p className="max-desk:pb-2">
        <span className="fig">
          ±{'\u00a0'}
          {probe.accuracy}
          {'\u00a0'}
          {unit}
        </span>
        {responseS === null ? (
          <span className="text-print">, response not known</span>
        ) : (
          <span className="fig">
            , answers in {responseS}
            {'\u00a0'}s
          </span>
        )}
        {certificate && (
          <span className="text-print">
            , {certificate}
            {calibrationU !== null && `, ±\u00a0${calibrationU}\u00a0${unit}`}
          </span>
        )}
        <br />
        <Link
          to={`/probes/${probe.id}/calibrations`}
          className="inline-flex min-h-touch items-center text-print desk:min-h-8"
        >
          {calibrationWords(probe, calibrations, zone, nowMs)}
        </Link>
      </p>
    </li>
  );
}

/** "calibrated 4 Feb, in date", or why it is not used. */
function calibrationWords(
  probe: StoredProbe,
  calibrations: StoredCalibration[],
  zone: string,
  nowMs: number,
): string {
  const { calibration } = probeInUse(probeOf(probe), calibrations.map(datedCalibration), nowMs);
  const newest = calibrations.find(({ id }) => id === calibration?.id);
  if (!calibration || !newest) return 'never calibrated here';
  const made = dateWords(newest.madeAtMs, zone, nowMs);
  return `calibrated ${made}, ${STANDING_WORDS[calibration.standing]}`;
}

const STANDING_WORDS: Record<CalibrationStanding, string> = {
  current: 'corrected',
  overdue: 'corrected, past its due date',
  'too-old': 'set aside: too old',
  'no-better': 'set aside: the stated accuracy is better',
};
