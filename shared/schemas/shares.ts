import { z } from 'zod';
import { idSchema, instantSchema } from './primitives.ts';
import { analysisSchema, judgedBySchema, noteSchema } from './runs.ts';

export const newShareSchema = z.object({
  days: z.int().min(1, 'At least 1 day').max(365, 'At most 365 days'),
});

/** A link as the shop sees it. The token itself is told once, when it is made. */
export const shareSchema = z.object({
  id: idSchema,
  runId: idSchema,
  madeAtMs: instantSchema,
  by: z.string(),
  expiresAtMs: instantSchema,
  revokedAtMs: instantSchema.nullable(),
  openedAtMs: instantSchema.nullable(),
});
export type Share = z.infer<typeof shareSchema>;
/** `url` holds the token in its fragment, which no server and no log ever sees. */
export const madeShareSchema = shareSchema.extend({ url: z.string() });

export const openShareSchema = z.object({ token: z.string().min(1).max(200) });

/** All that a customer may see: one run, as analysed when the link was made. */
export const sharedRunSchema = z.object({
  shop: z.object({
    name: z.string(),
    town: z.string(),
    phone: z.string(),
    email: z.string(),
    zone: z.string(),
  }),
  unit: z.enum(['F', 'C']),
  customerName: z.string(),
  address: z.string(),
  technician: z.string(),
  machine: z.object({ make: z.string(), model: z.string(), fuel: z.string(), place: z.string() }),
  jobNumber: z.int(),
  complaint: z.string(),
  runAtMs: instantSchema,
  duct: z.enum(['on', 'off']),
  load: z.enum(['empty', 'damp']),
  probeAccuracyK: z.number().nullable(),
  judgedBy: judgedBySchema.nullable(),
  analysis: analysisSchema,
  notes: z.array(noteSchema.pick({ timeS: true, tempC: true, text: true })),
  /** At most 1,200 columns of [s, lowest, highest], °C. */
  trace: z.array(z.tuple([z.number(), z.number(), z.number()])),
});
export type SharedRun = z.infer<typeof sharedRunSchema>;

/** The one answer to a wrong, expired or revoked link: how to reach the shop, and nothing else. */
export const linkProblemSchema = z.object({
  code: z.literal('link-not-open'),
  message: z.string(),
  shop: z.object({ name: z.string(), phone: z.string(), email: z.string() }),
});
