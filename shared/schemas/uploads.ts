import { z } from 'zod';
import { QUESTION_SUBJECTS } from '../reading/log-reading.ts';
import { analysisSchema } from './runs.ts';
import { idSchema, temperatureUnitSchema } from './primitives.ts';

const previewRowSchema = z.object({
  row: z.int(),
  cells: z.array(z.string()),
  timeS: z.number().nullable(),
  temp: z.number().nullable(),
});

const columnSchema = z.object({
  index: z.int(),
  name: z.string(),
  role: z.enum(['time', 'date', 'temperature', 'humidity', 'comment', 'other']),
  unit: temperatureUnitSchema.nullable(),
  unitFrom: z.string().nullable(),
});

export const readProblemSchema = z.object({
  code: z.string(),
  message: z.string(),
  row: z.int().nullable(),
  column: z.string().nullable(),
  value: z.string().nullable(),
  hint: z.string(),
});

export const readQuestionSchema = z.object({
  about: z.enum(QUESTION_SUBJECTS),
  options: z.array(
    z.object({ answer: z.string(), label: z.string(), preview: z.array(previewRowSchema) }),
  ),
  message: z.string(),
});

/** A person's answers and corrections; sent whole each time, and the file is read anew. */
export const readingChoicesSchema = z.object({
  answers: z.partialRecord(z.enum(QUESTION_SUBJECTS), z.string().max(60)),
  channel: z.string().max(200).nullable(),
});
export type ReadingChoices = z.infer<typeof readingChoicesSchema>;

/** What the preview shows. `trace` is at most 600 columns of [s, lowest, highest], °C. */
export const readPreviewSchema = z.object({
  timeColumn: z.string(),
  channel: z.string(),
  channelUnit: temperatureUnitSchema,
  columns: z.array(columnSchema),
  encoding: z.string(),
  delimiter: z.string(),
  decimal: z.string(),
  clock: z.string(),
  startedAt: z.string().nullable(),
  rows: z.int(),
  samples: z.int(),
  durationS: z.number(),
  skippedRows: z.array(z.object({ row: z.int(), why: z.string() })),
  skippedCount: z.int(),
  warnings: z.array(z.object({ code: z.string(), row: z.int().nullable(), message: z.string() })),
  preview: z.array(previewRowSchema),
  resultHash: z.string(),
  trace: z.array(z.tuple([z.number(), z.number(), z.number()])),
  /** Spans that a long pause parts the record into; one for the whole where there is none. */
  parts: z.array(z.object({ fromS: z.number(), toS: z.number() })),
  /** Judged with the machine's own rating, as it would be on accepting the whole. */
  analysis: analysisSchema,
});
export type ReadPreview = z.infer<typeof readPreviewSchema>;

/** A staged upload. It lives an hour; a refused one is already gone when this is read. */
export const uploadSchema = z.object({
  id: idSchema,
  visitId: idSchema,
  fileName: z.string(),
  bytes: z.int(),
  choices: readingChoicesSchema,
  reading: z.discriminatedUnion('state', [
    z.object({ state: z.literal('reading'), done: z.number() }),
    z.object({ state: z.literal('read'), preview: readPreviewSchema }),
    z.object({
      state: z.literal('question'),
      question: readQuestionSchema,
      columns: z.array(columnSchema),
    }),
    z.object({ state: z.literal('refused'), problem: readProblemSchema }),
  ]),
});
export type Upload = z.infer<typeof uploadSchema>;
