import { Link } from 'react-router-dom';
import type { StoredProbe } from '#shared/schemas/ratings.ts';
import { PROBE_KIND_WORDS, unitWords } from '../../format/rating-words.ts';
import { useNowMs } from '../../format/use-now.ts';
import { dateWords } from '../../format/when.ts';
import { useSession } from '../frame/session-context.ts';

type ProbeRowsProps = { probes: StoredProbe[]; mayChange: boolean };

export function ProbeRows({ probes, mayChange }: ProbeRowsProps) {
  return (
    <ul>
      {probes.map((probe) => (
        <ProbeRow key={probe.id} probe={probe} mayChange={mayChange} />
      ))}
    </ul>
  );
}

function ProbeRow({ probe, mayChange }: { probe: StoredProbe; mayChange: boolean }) {
  const { zone } = useSession().shop;
  const nowMs = useNowMs();
  const unit = unitWords(probe.unit);
  const { responseS, calibratedAtMs, calibrationU } = probe;
  const calibration =
    calibratedAtMs === null
      ? 'never calibrated'
      : `calibrated ${dateWords(calibratedAtMs, zone, nowMs)}`;
  return (
    <li className="words grid items-center gap-x-6 border-b border-hair py-1 desk:grid-cols-[minmax(0,1.1fr)_minmax(0,1fr)_minmax(0,1.6fr)]">
      <p className="text-[18px] font-semibold">
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
        <br />
        <span className="text-print">
          {calibration}
          {calibrationU !== null && `, ±\u00a0${calibrationU}\u00a0${unit}`}
        </span>
      </p>
    </li>
  );
}
