import { z } from 'zod';
import { PROBE_CLASSES } from '../probes/probe-class.ts';
import { displayUnitSchema, idSchema, instantSchema, neededWords, words } from './primitives.ts';

export const RATING_KINDS = [
  'cycling-thermostat',
  'high-limit',
  'thermal-cut-off',
  'thermal-fuse',
  'thermistor',
] as const;

const temp = z.number('Enter a number').min(-60, 'At least −60').max(1000, 'At most 1,000');
const step = z.number('Enter a number').min(0, 'At least 0').max(100, 'At most 100');

/**
 * What a thermostat, limit, cut-off or fuse is rated to do. Temperatures are in `unit` as typed, so that 155 °F
 * comes back as 155 °F. A cycling thermostat has opens and closes; a one-shot part has opens only.
 */
export const newRatingSchema = z
  .object({
    kind: z.enum(RATING_KINDS),
    name: neededWords(80, 'a name or part number'),
    unit: displayUnitSchema,
    opens: temp,
    opensTol: step,
    closes: temp.nullable(),
    closesTol: step.nullable(),
    overshoot: step,
    undershoot: step,
  })
  .refine((rating) => rating.closes === null || rating.closes < rating.opens, {
    path: ['closes'],
    message: 'Enter a temperature below the one it opens at',
  })
  .refine((rating) => rating.kind !== 'cycling-thermostat' || rating.closes !== null, {
    path: ['closes'],
    message: 'Enter where it closes again',
  });
export type NewRating = z.infer<typeof newRatingSchema>;

export const ratingSchema = newRatingSchema.safeExtend({ id: idSchema });
export type StoredRating = z.infer<typeof ratingSchema>;

export const PROBE_KINDS = [
  'thermocouple-k',
  'thermocouple-j',
  'thermocouple-t',
  'pt100',
  'thermistor',
  'liquid-in-glass',
  'other',
] as const;

export const newProbeSchema = z.object({
  name: neededWords(60, 'a name'),
  kind: z.enum(PROBE_KINDS),
  unit: displayUnitSchema,
  /** Its class by a standard, where it has one: proposes the accuracy. */
  accuracyClass: z.enum(PROBE_CLASSES).nullable(),
  /** ± accuracy in `unit` steps. */
  accuracy: step,
  /** Response time in moving air, s. */
  responseS: z.number('Enter a number').positive('More than 0').max(600, 'At most 600').nullable(),
  /** Expanded uncertainty of the last calibration, `unit` steps. */
  calibrationU: step.nullable(),
  calibratedAtMs: instantSchema.nullable(),
  notes: words(400),
});
export type NewProbe = z.infer<typeof newProbeSchema>;
export const probeSchema = newProbeSchema.extend({ id: idSchema });
export type StoredProbe = z.infer<typeof probeSchema>;
