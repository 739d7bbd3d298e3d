import { calibrateProbe, calibrationCorrection } from '#shared/probes/calibrate-probe.ts';
import { calibrationRecord } from '#shared/probes/calibration-record.ts';
import { rectangular } from '#shared/probes/combine-uncertainty.ts';
import { JUDGED_ABOUT_C } from '#shared/probes/probe-in-use.ts';
import { readingBudget } from '#shared/probes/reading-budget.ts';
import type { NewCalibration } from '#shared/schemas/calibrations.ts';
import { toKelvinStep, type DisplayUnit } from '#shared/units.ts';
import { formatRated, formatStep, formatTemp } from '#shared/wording/format.ts';
import { Table, Td, Th } from '../../components/table.tsx';
import { addsWords, BUDGET_WORDS } from '../../format/calibration-words.ts';

/** What follows from a calibration: the sentence, the points it rests on, and the uncertainty part by part. */
export function CalibrationResult({ calibration }: { calibration: NewCalibration }) {
  const { unit } = calibration;
  const isBaths = calibration.kind === 'ice-and-boiling';
  const result = calibrateProbe(calibrationRecord(calibration));
  const budget = budgetOf(calibration);
  const added = addsWords(calibrationCorrection(result, JUDGED_ABOUT_C), unit);
  return (
    <div className="max-w-read">
      <p className="pb-3 text-body">
        Near {formatRated(JUDGED_ABOUT_C, unit)} it {added}. A reading there, so corrected, is known
        to ±{'\u00a0'}
        {formatStep(budget.expanded, unit)} by the day the next calibration is due (95&nbsp;%).
      </p>
      <Points points={result.points} unit={unit} />
      <Table
        caption="Where the uncertainty comes from"
        className="mt-5"
        head={
          <>
            <Th>Where it comes from, near {formatRated(JUDGED_ABOUT_C, unit)}</Th>
            <Th figure>± (k = 2)</Th>
          </>
        }
      >
        {budget.parts.map(({ name, standard }) => (
          <tr key={name}>
            <Td>{name === 'calibration' && isBaths ? 'Drift' : BUDGET_WORDS[name]}</Td>
            <Td figure>{formatStep(2 * standard, unit)}</Td>
          </tr>
        ))}
      </Table>
    </div>
  );
}

/** On the day that it is due: drift counts in full. */
function budgetOf(calibration: NewCalibration) {
  const { correction, commonUK } = calibrateProbe(calibrationRecord(calibration));
  const driftK = toKelvinStep(calibration.drift, calibration.unit);
  const calibrationUK = 2 * Math.hypot(commonUK / 2, rectangular(driftK));
  return readingBudget({
    tempC: JUDGED_ABOUT_C,
    probe: { accuracyK: 0, calibrationUK, correction, responseS: null },
    resolutionK: toKelvinStep(calibration.resolution, calibration.unit),
    rateKPerS: 0,
    repeatsC: [],
  });
}

type PointsProps = {
  points: { readingC: number; referenceC: number }[];
  unit: DisplayUnit;
};

function Points({ points, unit }: PointsProps) {
  return (
    <Table
      caption="The points"
      head={
        <>
          <Th>It should read</Th>
          <Th figure>It read</Th>
          <Th figure>Differs by</Th>
        </>
      }
    >
      {points.map(({ readingC, referenceC }) => (
        <tr key={`${readingC} ${referenceC}`}>
          <Td className="fig">{formatTemp(referenceC, unit)}</Td>
          <Td figure>{formatTemp(readingC, unit)}</Td>
          <Td figure>{signedStep(readingC - referenceC, unit)}</Td>
        </tr>
      ))}
    </Table>
  );
}

function signedStep(stepK: number, unit: DisplayUnit): string {
  const step = formatStep(Math.abs(stepK), unit);
  if (/^0\.0/.test(step)) return step;
  return `${stepK > 0 ? '+' : '−'}${step}`;
}
