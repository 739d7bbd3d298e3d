import { notFound } from '#server/errors.ts';
import { needOwnRun, thingHandler } from '#server/sendings/thing-handler.ts';
import { sentRunNoteSchema } from '#shared/schemas/sendings.ts';
import { createNoteRepository } from './note-repository.ts';
import { createNoteService } from './note-service.ts';
import { createRunRepository } from './run-repository.ts';

/** A note on a run that was written on a device; it keeps the id it got there. */
export const runNoteHandler = thingHandler(sentRunNoteSchema, async (on, { runId, ...note }) => {
  const { trx, person, thing, nowMs } = on;
  await needOwnRun(on, runId);
  const runs = createRunRepository(trx);
  const get = async (id: string) => {
    const run = await runs.find(id);
    if (!run) throw notFound();
    return run;
  };
  const writtenAt = new Date(Math.min(thing.madeAtMs, nowMs));
  const notes = createNoteService(createNoteRepository(trx), { get }, () => writtenAt);
  await notes.add(person, runId, note, thing.id);
  return { status: 'applied', answer: { noteId: thing.id } };
});
