import { correctionAt } from '#shared/analysis/correct-series.ts';
import { totalUncertainty } from '#shared/analysis/judge-point.ts';
import { probeToJudgeWith } from '#shared/judging/judged-with.ts';
import { isSetAside, JUDGED_ABOUT_C } from '#shared/probes/probe-in-use.ts';
import type { JudgedWith } from '#shared/schemas/runs.ts';
import type { DisplayUnit } from '#shared/units.ts';
import { formatRated, formatStep } from '#shared/wording/format.ts';
import {
  addsWords,
  CALIBRATION_KIND_WORDS,
  standingWords,
} from '../../format/calibration-words.ts';
import { dateWords } from '../../format/when.ts';

type JudgedWithProps = { used: JudgedWith; judgedAtMs: number; unit: DisplayUnit; zone: string };

/** The probe as it was known when the run was judged, and the calibration that corrected it. */
export function JudgedWithProbe({ used, judgedAtMs, unit, zone }: JudgedWithProps) {
  const { calibration } = used;
  const uK = totalUncertainty(0, probeToJudgeWith(used), JUDGED_ABOUT_C);
  return (
    <div className="py-2 text-body">
      <p>
        Read with {used.name}, known to ±{'\u00a0'}
        {formatStep(uK, unit)} near {formatRated(JUDGED_ABOUT_C, unit)} (95&nbsp;%).{' '}
        {used.correction === null
          ? 'Its readings are taken as they are.'
          : `Its readings are corrected: the calibration ${addsWords(correctionAt(used.correction, JUDGED_ABOUT_C), unit)} there.`}
      </p>
      {calibration && (
        <p className="text-small text-print">
          {CALIBRATION_KIND_WORDS[calibration.kind]},{' '}
          {dateWords(calibration.madeAtMs, zone, judgedAtMs)}.{' '}
          {standingWords(calibration.standing, dateWords(calibration.dueAtMs, zone, judgedAtMs))}
          {isSetAside(calibration.standing) && ' Nothing was corrected.'}
        </p>
      )}
    </div>
  );
}
