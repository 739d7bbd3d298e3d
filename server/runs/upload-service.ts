import { rm } from 'node:fs/promises';
import { AppError, notFound, TooManyError } from '#server/errors.ts';
import type { Audit } from '#server/people/audit-repository.ts';
import type { Person } from '#shared/schemas/people.ts';
import type { AcceptUpload } from '#shared/schemas/runs.ts';
import type { ReadingChoices } from '#shared/schemas/uploads.ts';
import { createHeavyWork } from './heavy-work.ts';
import type { Inspection } from './inspect-log.ts';
import { judgingAtFirst } from '#shared/judging/judging-for.ts';
import type { LogWorker } from './log-worker.ts';
import type { ReceivedFile } from './receive-file.ts';
import type { RunService } from './run-service.ts';
import type { RunSources } from './run-sources.ts';
import type { StagedReading, StagedUpload } from './staged-upload.ts';

/** What nobody accepts is swept within the hour. */
const KEPT_MS = 55 * 60_000;
const MOST_STAGED = 10;
const STAGED_RETRY_S = 300;
const AS_FOUND: ReadingChoices = { answers: {}, channel: null };

export type UploadParts = {
  worker: LogWorker;
  sources: RunSources;
  runs: RunService;
  audit: Audit;
  onDefect: (error: unknown) => void;
};

export type UploadService = ReturnType<typeof createUploadService>;

/** Uploads between arriving and being accepted. They are in memory and one folder only; no table knows them. */
export function createUploadService({ worker, sources, runs, audit, onDefect }: UploadParts) {
  const staged = new Map<string, StagedUpload>();
  const heavyWork = createHeavyWork();

  function get(by: Person, id: string): StagedUpload {
    const upload = staged.get(id);
    if (!upload || upload.userId !== by.id) throw notFound();
    return upload;
  }

  /** Before a file is let in. What it returns gives the place back. */
  async function begin(by: Person, visitId: string): Promise<() => void> {
    await sources.visitFacts(visitId);
    const mine = [...staged.values()].filter(({ userId }) => userId === by.id);
    if (mine.length >= MOST_STAGED) {
      const message = 'Accept or discard one of your other files first.';
      throw new TooManyError('busy', message, STAGED_RETRY_S);
    }
    return heavyWork.take(by.id);
  }

  function stage(by: Person, visitId: string, file: ReceivedFile): StagedUpload {
    const upload: StagedUpload = {
      ...file,
      userId: by.id,
      visitId,
      choices: AS_FOUND,
      reading: beginning(),
      stop: new AbortController(),
      isDue: false,
    };
    staged.set(upload.id, upload);
    setTimeout(() => void sweep(upload).catch(onDefect), KEPT_MS).unref();
    return upload;
  }

  /** It goes on after the answer: the page asks how far it is, and the upload tells how it went. */
  function startReading(upload: StagedUpload, release: () => void): void {
    void read(upload).catch(onDefect).finally(release);
  }

  /** [2 read] what lies in the staging folder, for a person to look at. */
  async function read(upload: StagedUpload): Promise<void> {
    const progress = new SharedArrayBuffer(Float64Array.BYTES_PER_ELEMENT);
    const stop = new AbortController();
    upload.reading = { state: 'reading', progress };
    upload.stop = stop;
    try {
      const { path, choices } = upload;
      const { machine } = await sources.visitFacts(upload.visitId);
      const judging = judgingAtFirst(machine, (await sources.shop()).minCycles);
      const seen = await worker.inspect({ path, choices, judging, progress }, stop.signal);
      await show(upload, toReading(seen));
    } catch (error) {
      if (stop.signal.aborted) return;
      onDefect(error);
      upload.reading = { state: 'refused', problem: DEFECT };
      await rm(upload.path, { force: true });
    }
  }

  /** A refused file is of no use to anybody and is gone at once; why it was refused is still told. */
  async function show(upload: StagedUpload, reading: StagedReading): Promise<void> {
    if (reading.state === 'refused') {
      await rm(upload.path, { force: true });
      const details = { why: reading.problem.code, bytes: upload.bytes };
      const { userId, id } = upload;
      await audit({ userId, event: 'upload_validation', subject: id, details });
    }
    upload.reading = reading;
  }

  async function discard(upload: StagedUpload): Promise<void> {
    staged.delete(upload.id);
    upload.stop.abort();
    await rm(upload.path, { force: true });
  }

  /** One that is being accepted right now is left alone. */
  async function sweep(upload: StagedUpload): Promise<void> {
    upload.isDue = true;
    if (staged.has(upload.id)) await discard(upload);
  }

  return {
    begin,
    stage,
    startReading,
    get,
    discard: (by: Person, id: string) => discard(get(by, id)),
    sentUpload: (personId: string, id: string) =>
      Promise.resolve(staged.get(id)?.userId === personId),

    /** The same bytes are read anew with a person's answers. */
    choose(by: Person, id: string, choices: ReadingChoices): StagedUpload {
      const upload = get(by, id);
      if (upload.reading.state === 'refused') throw gone();
      const release = heavyWork.take(by.id);
      upload.choices = choices;
      startReading(upload, release);
      return upload;
    },

    async accept(by: Person, id: string, accept: AcceptUpload): Promise<string[]> {
      const upload = get(by, id);
      if (upload.reading.state !== 'read') throw gone();
      if (accept.visitId !== upload.visitId) {
        throw new AppError(400, 'other-visit', 'This file was sent to another visit.');
      }
      const release = heavyWork.take(by.id);
      // While it is being stored nobody else can discard or accept it.
      staged.delete(id);
      try {
        const { path, fileName, choices } = upload;
        return await runs.importRuns(by, { ...accept, id, path, fileName, choices });
      } catch (error) {
        staged.set(id, upload);
        if (upload.isDue) await discard(upload);
        throw error;
      } finally {
        release();
      }
    },
  };
}

const DEFECT = {
  code: 'defect',
  message: 'The file could not be read because something broke on our side.',
  row: null,
  column: null,
  value: null,
  hint: 'Send it again. If it happens once more, keep the file and tell whoever looks after Fusekeeper.',
};

function beginning(): StagedReading {
  return { state: 'reading', progress: new SharedArrayBuffer(Float64Array.BYTES_PER_ELEMENT) };
}

function toReading(seen: Inspection): StagedReading {
  if (seen.kind === 'read') {
    return { state: 'read', resultHash: seen.resultHash, previewJson: seen.previewJson };
  }
  if (seen.kind === 'refused') return { state: 'refused', problem: seen.problem };
  return { state: 'question', question: seen.question, columns: seen.columns };
}

function gone(): AppError {
  return new AppError(409, 'not-ready', 'There is nothing read that could be accepted.');
}
