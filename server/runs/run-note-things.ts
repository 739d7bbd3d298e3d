import { notFound } from '#server/errors.ts';
import {
  needOwnRun,
  NotYetError,
  thingHandler,
  type Applied,
  type ApplyOn,
} from '#server/sendings/thing-handler.ts';
import { replayRun } from '#shared/recorder/replay-run.ts';
import { seriesOfRun } from '#shared/recorder/series-of-run.ts';
import type { NewNote } from '#shared/schemas/runs.ts';
import {
  runNoteEditSchema,
  runNoteRemovalSchema,
  sentRunNoteSchema,
} from '#shared/schemas/sendings.ts';
import { createHandRunRepository } from './hand-run-repository.ts';
import type { MakeEnded } from './hand-run-thing.ts';
import { createNoteRepository, type RunNote } from './note-repository.ts';
import { createNoteService } from './note-service.ts';
import { createRunRepository } from './run-repository.ts';

/** Notes on runs, written, changed and removed on a device. */
export function runNoteHandlers(makeEnded: MakeEnded) {
  return {
    /** A note keeps the id that it got where it was written. */
    'run-note': thingHandler(sentRunNoteSchema, async (on, { runId, ...note }) => {
      await needRun(on, runId, makeEnded);
      await notesOn(on).service.add(on.person, runId, note, on.thing.id);
      return { status: 'applied', answer: { noteId: on.thing.id } };
    }),

    'run-note-edit': thingHandler(runNoteEditSchema, async (on, { runId, noteId, was, now }) => {
      await needRun(on, runId, makeEnded);
      const { repository, service } = notesOn(on);
      const note = await repository.find(runId, noteId);
      if (!note || !(isSame(note, was) || isSame(note, now))) return clash(note);
      await service.change(runId, noteId, now);
      return { status: 'applied', answer: { noteId } };
    }),

    'run-note-removal': thingHandler(runNoteRemovalSchema, async (on, { runId, noteId, was }) => {
      await needRun(on, runId, makeEnded);
      const { repository, service } = notesOn(on);
      const note = await repository.find(runId, noteId);
      // Somebody else removed it too: both have what they wanted.
      if (note && !isSame(note, was)) return clash(note);
      if (note) await service.remove(runId, noteId);
      return { status: 'applied', answer: { noteId } };
    }),
  };
}

/** One short transaction: everything is built on it. */
function notesOn({ trx, thing, nowMs }: ApplyOn) {
  const runs = createRunRepository(trx);
  const get = async (id: string) => {
    const run = await runs.find(id);
    if (!run) throw notFound();
    return run;
  };
  const writtenAt = new Date(Math.min(thing.madeAtMs, nowMs));
  const repository = createNoteRepository(trx);
  return { repository, service: createNoteService(repository, { get }, () => writtenAt) };
}

/** @throws {NotYetError} its events are here, or on their way, and it is made of them. @throws {AppError} may not */
async function needRun(on: ApplyOn, runId: string, makeEnded: MakeEnded): Promise<void> {
  const isMade = (await createRunRepository(on.trx).find(runId)) !== undefined;
  if (!isMade && (await isComing(on, runId))) {
    throw new NotYetError('The run that it belongs to has not come whole yet.', makeEnded);
  }
  await needOwnRun(on, runId);
}

/** A run by hand of this person, which goes on or was not made yet. */
async function isComing({ trx, person }: ApplyOn, runId: string): Promise<boolean> {
  const handRuns = createHandRunRepository(trx);
  if ((await handRuns.ownerOf(runId))?.userId !== person.id) return false;
  const run = replayRun(await handRuns.list(runId));
  if (!run || run.isThrownAway) return false;
  return run.end === null || seriesOfRun(run) !== null;
}

function isSame(one: NewNote, other: NewNote): boolean {
  return one.timeS === other.timeS && one.tempC === other.tempC && one.text === other.text;
}

/** What the shop has; null: the note is gone. */
function clash(note: RunNote | undefined): Applied {
  const { timeS, tempC, text } = note ?? {};
  return { status: 'conflict', server: { note: note ? { timeS, tempC, text } : null } };
}
