import { z } from 'zod';
import { newCalibrationSchema, type NewCalibration } from '#shared/schemas/calibrations.ts';
import type { DisplayUnit } from '#shared/units.ts';
import { readNumber } from '../../forms/typed-number.ts';
import { instantAt } from '../../format/when.ts';

/** Rows of the form for a reference thermometer; empty ones at the end are left out. */
export const REFERENCE_ROWS = 6;

/** 1 ft (NIST SP 811, B.8). */
const M_PER_FT = 0.3048;

const typedSchema = z.object({
  kind: z.string(),
  /** A day; noon in the shop's zone stands for it. */
  madeAtMs: z.string(),
  points: z.array(z.object({ reference: z.unknown(), readings: z.string() })),
  pressureHPa: z.unknown(),
  /** Feet where the probe's figures are in °F. */
  altitudeM: z.unknown(),
  referenceName: z.string(),
  referenceU: z.unknown(),
  resolution: z.unknown(),
  drift: z.unknown(),
  intervalMonths: z.unknown(),
  notes: z.string(),
});
export type TypedCalibration = z.infer<typeof typedSchema>;

/** What is typed, as the shared schema takes it; faults carry the names of the form's own fields. */
export function typedCalibrationSchema(
  unit: DisplayUnit,
  zone: string,
): z.ZodType<NewCalibration, TypedCalibration> {
  return typedSchema
    .transform((typed) => toCalibration(typed, unit, zone))
    .pipe(newCalibrationSchema as z.ZodType<NewCalibration, ReturnType<typeof toCalibration>>);
}

function toCalibration(typed: TypedCalibration, unit: DisplayUnit, zone: string) {
  const isBaths = typed.kind === 'ice-and-boiling';
  const altitude = isBaths ? readNumber(typed.altitudeM) : null;
  return {
    kind: isBaths ? ('ice-and-boiling' as const) : ('reference' as const),
    madeAtMs: instantAt(typed.madeAtMs, '12:00', zone) ?? Number.NaN,
    unit,
    points: isBaths ? bathPoints(typed) : referencePoints(typed),
    pressureHPa: isBaths ? readNumber(typed.pressureHPa) : null,
    altitudeM: altitude !== null && unit === 'F' ? altitude * M_PER_FT : altitude,
    referenceName: isBaths ? '' : typed.referenceName,
    referenceU: isBaths ? null : readNumber(typed.referenceU),
    resolution: readNumber(typed.resolution) ?? Number.NaN,
    drift: readNumber(typed.drift) ?? Number.NaN,
    intervalMonths: readNumber(typed.intervalMonths) ?? Number.NaN,
    notes: typed.notes,
  };
}

function bathPoints({ points }: TypedCalibration) {
  return points.slice(0, 2).map(({ readings }) => ({
    reference: null,
    readings: readNumbers(readings),
  }));
}

function referencePoints({ points }: TypedCalibration) {
  const rows = points.map(({ reference, readings }) => ({
    reference: readNumber(reference),
    readings: readNumbers(readings),
  }));
  const last = rows.findLastIndex(
    ({ reference, readings }) => reference !== null || readings.length > 0,
  );
  // Two points are the least, so that an empty form says what is missing.
  return rows.slice(0, Math.max(2, last + 1));
}

/** "31.8 31,9": figures parted by spaces. */
function readNumbers(typed: string): number[] {
  const parts = typed.split(/[\s;]+/).filter((part) => part !== '');
  return parts.map((part) => readNumber(part) ?? Number.NaN);
}
