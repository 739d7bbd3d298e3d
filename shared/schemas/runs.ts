import { z } from 'zod';
import { FINDING_CODES } from '../analysis/analysis.ts';
import { CALIBRATION_KINDS } from '../probes/calibrate-probe.ts';
import { CALIBRATION_STANDINGS } from '../probes/probe-in-use.ts';
import { heatSettingSchema } from './homes.ts';
import {
  idSchema,
  instantSchema,
  neededWords,
  temperatureUnitSchema,
  words,
} from './primitives.ts';
import { runPairsSchema } from './pairs.ts';
import { ratingSchema } from './ratings.ts';

export const MARK_KINDS = [
  'click',
  'heat-off',
  'heat-on',
  'flame-on',
  'stopped',
  'door',
  'duct-off',
  'note',
] as const;
export const markSchema = z.object({
  timeS: z.number().min(0),
  kind: z.enum(MARK_KINDS),
  text: words(200).optional(),
});

/** The analysis as it crosses the wire and as it is stored: shared/analysis/analysis.ts, checked. */
const pointSchema = z.object({
  kind: z.enum(['cut-out', 'reset']),
  timeS: z.number(),
  tempC: z.number(),
  uK: z.number(),
  uTotalK: z.number(),
  judged: z.boolean(),
  call: z.enum(['inside', 'outside', 'within-allowance', 'too-close']).nullable(),
  probability: z.number().nullable(),
  switchTimeS: z.number().nullable(),
  switchTempC: z.number().nullable(),
  switchUS: z.number().nullable(),
});
export const analysisSchema = z.object({
  version: z.string(),
  samples: z.int(),
  durationS: z.number(),
  spikes: z.int(),
  gaps: z.array(z.object({ fromS: z.number(), toS: z.number() })),
  noiseK: z.number(),
  cutOuts: z.array(pointSchema),
  resets: z.array(pointSchema),
  cycles: z.array(z.object({ offS: z.number(), onS: z.number(), swingK: z.number() })),
  legs: z.array(
    z.object({
      kind: z.enum(['heating', 'cooling']),
      fromS: z.number(),
      toS: z.number(),
      asymptoteC: z.number().nullable(),
      asymptoteUK: z.number().nullable(),
      tauS: z.number().nullable(),
      tauUS: z.number().nullable(),
      knee: z.object({ timeS: z.number(), tempC: z.number() }).nullable(),
    }),
  ),
  findings: z.array(
    z.object({
      code: z.enum(FINDING_CODES),
      fromS: z.number(),
      toS: z.number(),
      evidence: z.record(z.string(), z.union([z.number(), z.string(), z.boolean(), z.null()])),
    }),
  ),
  outcome: z.enum(['stop', 'proven', 'not-proven']),
  notJudged: z.enum(['no-rating', 'probe-too-slow']).nullable(),
  guardAlarmS: z.number().nullable(),
});

/** What the technician says of a run; asked for before it is accepted. */
export const runConditionsSchema = z.object({
  placement: neededWords(80, 'where the probe sat'),
  duct: z.enum(['on', 'off']),
  load: z.enum(['empty', 'damp']),
  setting: heatSettingSchema,
  roomTemp: z.number('Enter a number').min(-60).max(200).nullable(),
  roomUnit: temperatureUnitSchema,
  probeId: idSchema.nullable(),
});
export type RunConditions = z.infer<typeof runConditionsSchema>;

/** A run in a list: enough for a spark, its calls and its outcome. `trace` is at most 66 time/temperature pairs, °C. */
export const runCardSchema = z.object({
  id: idSchema,
  visitId: idSchema,
  label: z.string(),
  startedAtMs: instantSchema,
  samples: z.int(),
  durationS: z.number(),
  outcome: z.enum(['stop', 'proven', 'not-proven']),
  headline: z.enum(FINDING_CODES),
  calls: z.array(z.enum(['inside', 'outside', 'within-allowance', 'too-close'])),
  trace: z.array(z.tuple([z.number(), z.number()])),
  bands: z
    .object({
      opensC: z.number(),
      opensTolK: z.number(),
      closesC: z.number(),
      closesTolK: z.number(),
      highLimitC: z.number(),
    })
    .nullable(),
});
export type RunCard = z.infer<typeof runCardSchema>;

/** The rating a run was judged by, in °C, with its name; kept with the analysis. */
export const judgedBySchema = z.object({
  ratingId: idSchema.nullable(),
  name: z.string(),
  opensC: z.number(),
  opensTolK: z.number(),
  closesC: z.number(),
  closesTolK: z.number(),
  overshootK: z.number(),
  undershootK: z.number(),
  highLimitC: z.number(),
  ceilingC: z.number(),
});
export type JudgedBy = z.infer<typeof judgedBySchema>;

const correctionSchema = z.object({
  aboutC: z.number(),
  interceptK: z.number(),
  slope: z.number(),
  interceptErrorK: z.number(),
  slopeError: z.number(),
  correlation: z.number(),
});

/** How good the probe was known to be, in K and s, with its name; kept with the analysis. */
export const judgedWithSchema = z.object({
  probeId: idSchema,
  name: z.string(),
  accuracyK: z.number(),
  calibrationUK: z.number(),
  correction: correctionSchema.nullable(),
  responseS: z.number().nullable(),
  /** The calibration in force then, used or set aside. */
  calibration: z
    .object({
      id: idSchema,
      kind: z.enum(CALIBRATION_KINDS),
      madeAtMs: instantSchema,
      dueAtMs: instantSchema,
      standing: z.enum(CALIBRATION_STANDINGS),
    })
    .nullable(),
});
export type JudgedWith = z.infer<typeof judgedWithSchema>;

export const storedAnalysisSchema = z.object({
  id: idSchema,
  madeAtMs: instantSchema,
  judgedBy: judgedBySchema.nullable(),
  /** null where no probe was named, or before there was such a thing. */
  judgedWith: judgedWithSchema.nullable(),
  analysis: analysisSchema,
});
export type StoredAnalysis = z.infer<typeof storedAnalysisSchema>;

/** A note at a time and temperature, drawn as a leader line. `letter` is given in order of time by the page. */
export const newNoteSchema = z.object({
  timeS: z.number('Enter a time').min(0, 'A time within the run'),
  tempC: z.number('Enter a temperature').min(-60).max(1000),
  text: neededWords(200, 'the note'),
});
export type NewNote = z.infer<typeof newNoteSchema>;
export const noteSchema = newNoteSchema.extend({
  id: idSchema,
  by: z.string(),
  writtenAtMs: instantSchema,
});
export type Note = z.infer<typeof noteSchema>;

// A schema with refinements cannot be picked from.
const { id, name } = ratingSchema.shape;
const namedRatingSchema = z.object({ id, name });

export const runPageSchema = z.object({
  id: idSchema,
  visitId: idSchema,
  job: z.object({ id: idSchema, number: z.int() }),
  label: z.string(),
  startedAtMs: instantSchema,
  conditions: runConditionsSchema,
  marks: z.array(markSchema),
  probe: z
    .object({
      id: idSchema,
      name: z.string(),
      accuracyK: z.number(),
      responseS: z.number().nullable(),
    })
    .nullable(),
  machine: z.object({
    id: idSchema,
    make: z.string(),
    model: z.string(),
    serial: z.string(),
    fuel: z.string(),
    control: z.string(),
  }),
  customer: z.object({ id: idSchema, name: z.string() }),
  home: z.object({ id: idSchema, address: z.string() }),
  technician: z.string(),
  fitted: z.array(namedRatingSchema.extend({ kind: ratingSchema.shape.kind })),
  /** Cycling ratings that it could be judged against instead: the machine's own first. */
  otherRatings: z.array(namedRatingSchema),
  samples: z.int(),
  durationS: z.number(),
  channel: z.string(),
  channels: z.array(z.string()),
  channelUnit: temperatureUnitSchema,
  file: z.object({ name: z.string(), bytes: z.int(), sha256: z.string() }),
  skippedCount: z.int(),
  skippedRows: z.array(z.object({ row: z.int(), why: z.string() })),
  warnings: z.array(z.object({ code: z.string(), row: z.int().nullable(), message: z.string() })),
  analysis: storedAnalysisSchema,
  /** Earlier analyses of the same run, newest first. */
  earlier: z.array(
    storedAnalysisSchema
      .pick({ id: true, madeAtMs: true, judgedBy: true })
      .extend({ version: z.string().default('') }),
  ),
  /** The engine that the server has now: what judging again would be done by. */
  engineVersion: z.string().default(''),
  pairs: runPairsSchema,
  notes: z.array(noteSchema),
  /** The signed-in person may write notes, judge again and share. */
  mayWrite: z.boolean(),
});
export type RunPage = z.infer<typeof runPageSchema>;

export const judgeAgainSchema = z.object({ ratingId: idSchema.nullable() });

/** A span of a staged log that becomes a run of its own. */
export const runSpanSchema = z
  .object({
    fromS: z.number().min(0),
    toS: z.number(),
    label: neededWords(60, 'a name for the run'),
  })
  .refine((span) => span.toS > span.fromS, { path: ['toS'], message: 'End after it starts' });

export const acceptUploadSchema = z.object({
  visitId: idSchema,
  /** resultHash of the preview that was looked at: the import must give the same. */
  resultHash: z.string().min(1),
  conditions: runConditionsSchema,
  marks: z.array(markSchema).max(500),
  spans: z.array(runSpanSchema).min(1).max(20),
  startedAtMs: instantSchema.nullable(),
});
export type AcceptUpload = z.infer<typeof acceptUploadSchema>;
