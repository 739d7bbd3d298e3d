import { z } from 'zod';
import type { TemperatureUnit } from '#shared/units.ts';
import { temperatureUnitSchema } from '#shared/schemas/primitives.ts';
import {
  markSchema,
  type JudgedBy,
  type JudgedWith,
  type RunConditions,
} from '#shared/schemas/runs.ts';
import { readingChoicesSchema } from '#shared/schemas/uploads.ts';
import type { Judged } from './import-log.ts';

/** JSON columns of a run, checked when they are read. */
export const marksSchema = z.array(markSchema);
export const channelsSchema = z.array(z.object({ name: z.string(), unit: temperatureUnitSchema }));
export const sparkSchema = z.array(z.tuple([z.number(), z.number()]));
export const storedReadingSchema = z.object({
  choices: readingChoicesSchema,
  fromS: z.number(),
  toS: z.number(),
  clock: z.string(),
  encoding: z.string(),
  startedAt: z.string().nullable(),
  skippedCount: z.int(),
  skippedRows: z.array(z.object({ row: z.int(), why: z.string() })),
  warnings: z.array(z.object({ code: z.string(), row: z.int().nullable(), message: z.string() })),
});

/** A run as it is stored, without its readings and results. */
export type Run = {
  id: string;
  visitId: string;
  uploadId: string;
  /** How it came: a probe's file, or taken by hand. */
  source: 'file' | 'stopwatch';
  label: string;
  startedAtMs: number;
  acceptedAtMs: number;
  conditions: RunConditions;
  marks: z.infer<typeof marksSchema>;
  samples: number;
  durationS: number;
  channel: string;
  channelUnit: TemperatureUnit;
  channels: z.infer<typeof channelsSchema>;
  reading: z.infer<typeof storedReadingSchema>;
  spark: z.infer<typeof sparkSchema>;
};

/** The untouched file behind one or more runs; its octets lie in the data folder under `id`. */
export type UploadedFile = {
  id: string;
  fileName: string;
  bytes: number;
  sha256: string;
  uploadedBy: string;
  uploadedAtMs: number;
};

export type NewAnalysis = Judged & {
  id: string;
  runId: string;
  madeAtMs: number;
  judgedBy: JudgedBy | null;
  judgedWith: JudgedWith | null;
};

/** What a list needs of an analysis. */
export type AnalysisHead = Pick<
  NewAnalysis,
  'id' | 'runId' | 'version' | 'madeAtMs' | 'judgedBy' | 'outcome' | 'headline' | 'calls'
>;
