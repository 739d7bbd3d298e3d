import type { Knex } from 'knex';
import { heatSettingSchema } from '#shared/schemas/homes.ts';
import { temperatureUnitSchema } from '#shared/schemas/primitives.ts';
import { runConditionsSchema } from '#shared/schemas/runs.ts';
import {
  channelsSchema,
  marksSchema,
  sparkSchema,
  storedReadingSchema,
  type Run,
  type UploadedFile,
} from './run.ts';

type RunRow = {
  id: string;
  visit_id: string;
  upload_id: string;
  source: string;
  probe_id: string | null;
  label: string;
  started_at_ms: number | string;
  accepted_at_ms: number | string;
  placement: string;
  duct: string;
  load: string;
  setting: string;
  room_temp: number | null;
  room_unit: string;
  marks: string;
  samples: number;
  duration_s: number;
  channel: string;
  channel_unit: string;
  channels: string;
  reading: string;
  spark: string;
};

type UploadRow = {
  id: string;
  file_name: string;
  bytes: number | string;
  sha256: string;
  uploaded_by: string;
  uploaded_at_ms: number | string;
};

export type RunRepository = ReturnType<typeof createRunRepository>;

/** Runs and the files that they came from. Takes a connection or a transaction. */
export function createRunRepository(db: Knex) {
  return {
    async insert(run: Run): Promise<void> {
      await db<RunRow>('runs').insert(toRow(run));
    },

    async find(id: string): Promise<Run | undefined> {
      const row = await db<RunRow>('runs').where({ id }).first();
      return row && toRun(row);
    },

    /** Newest first. */
    async listByVisits(visitIds: string[]): Promise<Run[]> {
      const rows = await db<RunRow>('runs')
        .whereIn('visit_id', visitIds)
        .orderBy([
          { column: 'started_at_ms', order: 'desc' },
          { column: 'id', order: 'desc' },
        ]);
      return rows.map(toRun);
    },

    async insertUpload(file: UploadedFile): Promise<void> {
      await db<UploadRow>('uploads').insert({
        id: file.id,
        file_name: file.fileName,
        bytes: file.bytes,
        sha256: file.sha256,
        uploaded_by: file.uploadedBy,
        uploaded_at_ms: file.uploadedAtMs,
      });
    },

    async findUpload(id: string): Promise<UploadedFile | undefined> {
      const row = await db<UploadRow>('uploads').where({ id }).first();
      return (
        row && {
          id: row.id,
          fileName: row.file_name,
          bytes: Number(row.bytes),
          sha256: row.sha256,
          uploadedBy: row.uploaded_by,
          uploadedAtMs: Number(row.uploaded_at_ms),
        }
      );
    },
  };
}

function toRow(run: Run): RunRow {
  const { conditions } = run;
  return {
    id: run.id,
    visit_id: run.visitId,
    upload_id: run.uploadId,
    source: run.source,
    probe_id: conditions.probeId,
    label: run.label,
    started_at_ms: run.startedAtMs,
    accepted_at_ms: run.acceptedAtMs,
    placement: conditions.placement,
    duct: conditions.duct,
    load: conditions.load,
    setting: conditions.setting,
    room_temp: conditions.roomTemp,
    room_unit: conditions.roomUnit,
    marks: JSON.stringify(run.marks),
    samples: run.samples,
    duration_s: run.durationS,
    channel: run.channel,
    channel_unit: run.channelUnit,
    channels: JSON.stringify(run.channels),
    reading: JSON.stringify(run.reading),
    spark: JSON.stringify(run.spark),
  };
}

function toRun(row: RunRow): Run {
  return {
    id: row.id,
    visitId: row.visit_id,
    uploadId: row.upload_id,
    source: row.source === 'stopwatch' ? 'stopwatch' : 'file',
    label: row.label,
    startedAtMs: Number(row.started_at_ms),
    acceptedAtMs: Number(row.accepted_at_ms),
    conditions: runConditionsSchema.parse({
      placement: row.placement,
      duct: row.duct,
      load: row.load,
      setting: heatSettingSchema.parse(row.setting),
      roomTemp: row.room_temp,
      roomUnit: row.room_unit,
      probeId: row.probe_id,
    }),
    marks: marksSchema.parse(JSON.parse(row.marks)),
    samples: row.samples,
    durationS: row.duration_s,
    channel: row.channel,
    channelUnit: temperatureUnitSchema.parse(row.channel_unit),
    channels: channelsSchema.parse(JSON.parse(row.channels)),
    reading: storedReadingSchema.parse(JSON.parse(row.reading)),
    spark: sparkSchema.parse(JSON.parse(row.spark)),
  };
}
