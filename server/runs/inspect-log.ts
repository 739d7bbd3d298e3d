import { analyseRun } from '#shared/analysis/analyse-run.ts';
import type { LogReading, ReadOutcome } from '#shared/reading/log-reading.ts';
import { findParts } from '#shared/reading/find-parts.ts';
import { traceColumns } from '#shared/reading/preview-trace.ts';
import type { ReadPreview } from '#shared/schemas/uploads.ts';
import { judgingOfSpan, type Judging } from '#shared/judging/judging.ts';
import { roomOf } from '#shared/reading/room-of.ts';

const PREVIEW_COLUMNS = 600;

type NotRead = Exclude<ReadOutcome, { kind: 'read' }>;

/** What the upload page is told. The preview is JSON text in octets: the main thread only passes it on. */
export type Inspection = NotRead | { kind: 'read'; resultHash: string; previewJson: Uint8Array };

/** Looks at a log that was read: judged whole, drawn small, told in full. */
export function inspectLog(outcome: ReadOutcome, judging: Judging): Inspection {
  if (outcome.kind !== 'read') return outcome;
  const preview = JSON.stringify(previewOf(outcome.reading, judging));
  const { resultHash } = outcome.reading;
  return { kind: 'read', resultHash, previewJson: new TextEncoder().encode(preview) };
}

function previewOf(reading: LogReading, judging: Judging): ReadPreview {
  const { series } = reading;
  const toS = series.timesS.at(-1) ?? 0;
  const room = { ...judging, roomC: judging.roomC ?? roomOf(reading, 0, toS) };
  return {
    timeColumn: reading.timeColumn,
    channel: reading.channel,
    channelUnit: reading.channelUnit,
    columns: reading.columns,
    encoding: reading.encoding,
    delimiter: reading.delimiter,
    decimal: reading.decimal,
    clock: reading.clock,
    startedAt: reading.startedAt,
    rows: reading.rows,
    samples: series.timesS.length,
    durationS: toS,
    skippedRows: reading.skippedRows,
    skippedCount: reading.skippedCount,
    warnings: reading.warnings,
    preview: reading.preview,
    resultHash: reading.resultHash,
    trace: traceColumns(series.timesS, series.tempsC, PREVIEW_COLUMNS),
    parts: findParts(series.timesS),
    analysis: analyseRun(series, judgingOfSpan(room, 0, toS)),
  };
}
