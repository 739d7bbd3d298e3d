import { z } from 'zod';
import { CALIBRATION_KINDS, calibrateProbe } from '../probes/calibrate-probe.ts';
import { calibrationRecord } from '../probes/calibration-record.ts';
import { displayUnitSchema, idSchema, instantSchema, words } from './primitives.ts';

const temp = z.number('Enter a number').min(-60, 'At least −60').max(600, 'At most 600');
const step = z.number('Enter a number').min(0, 'At least 0').max(50, 'At most 50');

const calibrationFields = z.object({
  kind: z.enum(CALIBRATION_KINDS),
  madeAtMs: instantSchema,
  unit: displayUnitSchema,
  /** What the reference showed (null in ice and in boiling water, in this order) and what the probe read, in `unit`. */
  points: z
    .array(
      z.object({
        reference: temp.nullable(),
        readings: z.array(temp).min(1, 'Enter what the probe read').max(20, 'At most 20 readings'),
      }),
    )
    .min(2, 'Enter at least two points')
    .max(12, 'At most 12 points'),
  /** At the place, not reduced to sea level. */
  pressureHPa: z
    .number('Enter a number')
    .min(500, 'At least 500')
    .max(1100, 'At most 1,100')
    .nullable(),
  altitudeM: z.number('Enter a number').min(-400, 'Too low').max(5000, 'Too high').nullable(),
  referenceName: words(80),
  /** Expanded (k = 2) uncertainty of the reference, in `unit` steps. */
  referenceU: step.nullable(),
  /** The step that the probe's readings are shown in, in `unit`. */
  resolution: step,
  /** ± drift until the next calibration is due, in `unit` steps. */
  drift: step,
  intervalMonths: z.int('Enter a whole number').min(1, 'At least 1').max(60, 'At most 60'),
  notes: words(400),
});

/** A calibration as it was written down. It must be one that a correction follows from. */
export const newCalibrationSchema = calibrationFields.superRefine((calibration, context) => {
  for (const { path, message } of faultsOf(calibration)) {
    context.addIssue({ code: 'custom', path, message });
  }
});
export type NewCalibration = z.infer<typeof newCalibrationSchema>;

export const calibrationSchema = calibrationFields.extend({
  id: idSchema,
  probeId: idSchema,
  recordedAtMs: instantSchema,
});
export type StoredCalibration = z.infer<typeof calibrationSchema>;

type Fault = { path: (string | number)[]; message: string };

function faultsOf(calibration: NewCalibration): Fault[] {
  const faults =
    calibration.kind === 'reference' ? referenceFaults(calibration) : bathFaults(calibration);
  return faults.length > 0 ? faults : lineFaults(calibration);
}

function referenceFaults({ points, referenceName, referenceU }: NewCalibration): Fault[] {
  const faults: Fault[] = points.flatMap(({ reference }, i) =>
    reference === null
      ? [{ path: ['points', i, 'reference'], message: 'Enter what the reference showed' }]
      : [],
  );
  if (referenceName === '') {
    faults.push({ path: ['referenceName'], message: 'Enter which thermometer it was held beside' });
  }
  if (referenceU === null) {
    faults.push({ path: ['referenceU'], message: 'Enter its uncertainty, from its certificate' });
  }
  return faults;
}

function bathFaults({ points, pressureHPa, altitudeM }: NewCalibration): Fault[] {
  if (points.length !== 2) return [{ path: ['points'], message: 'Ice and boiling are two points' }];
  if (pressureHPa !== null || altitudeM !== null) return [];
  return [{ path: ['pressureHPa'], message: 'Enter the air pressure, or the altitude' }];
}

/** What only the calculation knows: points too near together, or farther off than any sound probe. */
function lineFaults(calibration: NewCalibration): Fault[] {
  try {
    calibrateProbe(calibrationRecord(calibration));
    return [];
  } catch (error) {
    if (!(error instanceof RangeError)) throw error;
    return [{ path: ['points'], message: `No correction follows from this: ${error.message}` }];
  }
}
