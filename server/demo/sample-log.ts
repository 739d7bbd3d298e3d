import { readFile } from 'node:fs/promises';
import { z } from 'zod';
import { heatSettingSchema } from '#shared/schemas/homes.ts';
import { markSchema } from '#shared/schemas/runs.ts';

// From source and built alike, the project's folder lies two levels up.
const SAMPLE_LOGS = new URL('../../sample-logs/', import.meta.url);

const sampleLogSchema = z.object({
  file: z.string(),
  marks: z.array(markSchema),
  roomF: z.number(),
  load: z.enum(['empty', 'damp']),
  duct: z.enum(['on', 'off']),
  setting: heatSettingSchema,
});

/** What is known of a sample log beside its readings. */
export type SampleLog = z.infer<typeof sampleLogSchema>;

export async function readSampleLogs(): Promise<Map<string, SampleLog>> {
  const text = await readFile(new URL('expected.json', SAMPLE_LOGS), 'utf8');
  const logs = z.array(sampleLogSchema).parse(JSON.parse(text));
  return new Map(logs.map((log) => [log.file, log]));
}

export function sampleLogUrl(file: string): URL {
  return new URL(file, SAMPLE_LOGS);
}
