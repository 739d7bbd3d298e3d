import type { ReadProblem, ReadQuestion, LogColumn } from '#shared/reading/log-reading.ts';
import type { ReadingChoices } from '#shared/schemas/uploads.ts';

export type StagedReading =
  | { state: 'reading'; progress: SharedArrayBuffer }
  | { state: 'read'; resultHash: string; previewJson: Uint8Array }
  | { state: 'question'; question: ReadQuestion; columns: LogColumn[] }
  | { state: 'refused'; problem: ReadProblem };

/** An upload that waits for a person: known to this process only, and to one file of the staging folder. */
export type StagedUpload = {
  id: string;
  userId: string;
  visitId: string;
  fileName: string;
  bytes: number;
  path: string;
  choices: ReadingChoices;
  reading: StagedReading;
  /** Ends the reading that is going on. */
  stop: AbortController;
  /** It has waited long enough. */
  isDue: boolean;
};

/** The `upload` of the wire as JSON octets. The preview is passed through as the worker wrote it. */
export function uploadJson(staged: StagedUpload): Buffer {
  const { id, visitId, fileName, bytes, choices } = staged;
  const outside = JSON.stringify({ id, visitId, fileName, bytes, choices });
  return Buffer.concat([
    Buffer.from(`${outside.slice(0, -1)},"reading":`),
    readingJson(staged.reading),
    Buffer.from('}'),
  ]);
}

function readingJson(reading: StagedReading): Uint8Array {
  if (reading.state === 'read') {
    return Buffer.concat([
      Buffer.from('{"state":"read","preview":'),
      reading.previewJson,
      Buffer.from('}'),
    ]);
  }
  if (reading.state === 'reading') {
    const done = new Float64Array(reading.progress)[0] ?? 0;
    return Buffer.from(JSON.stringify({ state: 'reading', done }));
  }
  return Buffer.from(JSON.stringify(reading));
}
