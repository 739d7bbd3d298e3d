import { z } from 'zod';
import type { RunEvent } from '../recorder/run-event.ts';
import { HEAT_SETTINGS } from './homes.ts';
import { displayUnitSchema, idSchema, instantSchema, neededWords, words } from './primitives.ts';
import { MARK_KINDS } from './runs.ts';

/** What five figures can say: a slip of the finger is undone on the device and must not hold up what comes after it. */
const temp = z.number().min(-99_999).max(99_999);
const seconds = z.number().min(0).max(172_800);

const setupSchema = z.object({
  placement: words(80),
  duct: z.enum(['on', 'off']).nullable(),
  load: z.enum(['empty', 'damp']).nullable(),
  setting: z.enum(HEAT_SETTINGS),
  roomTemp: temp.nullable(),
  probeId: idSchema.nullable(),
});
const endSetupSchema = setupSchema.extend({
  placement: neededWords(80, 'where the probe sat'),
  duct: z.enum(['on', 'off']),
  load: z.enum(['empty', 'damp']),
});
const label = neededWords(60, 'a name for the run');

const stamp = {
  id: idSchema,
  runId: idSchema,
  n: z.int().min(0).max(20_000),
  atS: seconds,
  wallMs: z.number().min(0),
};

function event<Kind extends RunEvent['kind'], Shape extends z.ZodRawShape>(
  kind: Kind,
  shape: Shape,
) {
  return z.object({ ...stamp, kind: z.literal(kind), ...shape });
}

/** One line of a run taken by hand, as a device sends it: shared/recorder/run-event.ts, checked. */
export const runEventSchema = z.discriminatedUnion('kind', [
  event('start', {
    visitId: idSchema,
    label,
    unit: displayUnitSchema,
    hasTenths: z.boolean(),
    setup: setupSchema,
  }),
  event('reading', {
    temp,
    from: z.enum(['hand', 'probe']),
    measured: z.object({ temp, unit: displayUnitSchema }).optional(),
  }),
  event('mark', { mark: z.enum(MARK_KINDS), text: words(200).nullable() }),
  event('undo', { takes: idSchema }),
  event('correction', { of: idSchema, temp }),
  event('asleep', { fromS: seconds }),
  event('clock-step', { stepS: z.number() }),
  event('clock-check', { serverMs: instantSchema }),
  event('probe-gap', { fromS: seconds }),
  event('guard', {
    says: z.enum(['quiet', 'watch', 'cut-heat', 'unplug']),
    why: z.string().max(60),
  }),
  event('end', {
    label,
    setup: endSetupSchema,
    reached: z.object({ serverMs: instantSchema, phoneMs: instantSchema }).optional(),
  }),
  event('thrown-away', {}),
]) satisfies z.ZodType<RunEvent>;
