import { z } from 'zod';
import { customerSchema, homeSchema, machineSchema } from './homes.ts';
import { idSchema, instantSchema, neededWords, words } from './primitives.ts';
import { runCardSchema } from './runs.ts';

export const JOB_STATES = [
  'booked',
  'on-site',
  'waiting-for-part',
  'proof-run-due',
  'fixed',
  'closed',
] as const;
export const jobStateSchema = z.enum(JOB_STATES);
export type JobState = z.infer<typeof jobStateSchema>;

export const newJobSchema = z.object({
  machineId: idSchema,
  complaint: neededWords(1000, 'the complaint in the customer’s words'),
  /** The job that this one calls back. */
  callsBackJobId: idSchema.nullable(),
});
export type NewJob = z.infer<typeof newJobSchema>;

export const jobChangeSchema = z.object({ state: jobStateSchema });
export type JobChange = z.infer<typeof jobChangeSchema>;

export const newVisitSchema = z.object({
  technicianId: idSchema,
  startsAtMs: instantSchema,
  endsAtMs: instantSchema,
  notes: words(2000),
});
export type NewVisit = z.infer<typeof newVisitSchema>;

const jobCoreSchema = z.object({
  id: idSchema,
  /** What people call it: "job 1184". */
  number: z.int(),
  complaint: z.string(),
  state: jobStateSchema,
  takenAtMs: instantSchema,
  callsBack: z.object({ id: idSchema, number: z.int(), takenAtMs: instantSchema }).nullable(),
  customer: customerSchema,
  home: homeSchema,
  machine: machineSchema,
});

export const visitSchema = z.object({
  id: idSchema,
  jobId: idSchema,
  technician: z.object({ id: idSchema, name: z.string() }),
  startsAtMs: instantSchema,
  endsAtMs: instantSchema,
  /** When the safety cautions were ticked; null: not yet. */
  safetyTickedAtMs: instantSchema.nullable(),
  notes: z.string(),
  /** Which state the notes are in: the id of the last edit, '' as booked. */
  notesVersion: z.string(),
  notesEdited: z.object({ by: z.string(), atMs: instantSchema }).nullable(),
});
export type Visit = z.infer<typeof visitSchema>;

/** A row of the Jobs table. */
export const jobListItemSchema = jobCoreSchema.extend({
  technicians: z.array(z.string()),
  nextVisitAtMs: instantSchema.nullable(),
  lastRun: runCardSchema.nullable(),
});
export const jobListSchema = z.array(jobListItemSchema);
export type JobListItem = z.infer<typeof jobListItemSchema>;

/** One job: its visits, each with its runs, newest visit first. */
export const jobPageSchema = jobCoreSchema.extend({
  visits: z.array(visitSchema.extend({ runs: z.array(runCardSchema) })),
});
export type JobPage = z.infer<typeof jobPageSchema>;

/** The on-site page. `mayRecord`: the signed-in person may put runs on this visit. */
export const visitPageSchema = visitSchema.extend({
  job: jobCoreSchema,
  runs: z.array(runCardSchema),
  mayRecord: z.boolean(),
});
export type VisitPage = z.infer<typeof visitPageSchema>;

/** One visit of the day. `before`: what was done last time, where this is a callback. */
export const roundsItemSchema = visitSchema.extend({
  job: jobCoreSchema,
  before: z.string().nullable(),
  runs: z.array(runCardSchema),
});
export const roundsSchema = z.object({ day: z.string(), visits: z.array(roundsItemSchema) });
export type RoundsItem = z.infer<typeof roundsItemSchema>;
export type Rounds = z.infer<typeof roundsSchema>;
