import { notFound } from '#server/errors.ts';
import { needOwnVisit, thingHandler } from '#server/sendings/thing-handler.ts';
import { safetyTicksSchema, visitEditSchema } from '#shared/schemas/sendings.ts';
import { createVisitRepository } from './visit-repository.ts';

/** Notes of a visit, as they were edited on a device. */
export const visitEditHandler = thingHandler(visitEditSchema, async (on, edit) => {
  const { trx, person, thing, nowMs } = on;
  await needOwnVisit(on, edit.visitId);
  const visits = createVisitRepository(trx);
  const visit = await visits.find(edit.visitId);
  if (!visit) throw notFound();
  const { notes, notesVersion, notesEdited } = visit;
  if (edit.basedOn !== notesVersion) {
    return { status: 'conflict', server: { notes, notesVersion, notesEdited } };
  }
  const edited = {
    version: thing.id,
    editedBy: person.id,
    editedAtMs: Math.min(thing.madeAtMs, nowMs),
  };
  await visits.setNotes(visit.id, edit.notes, edited);
  return { status: 'applied', answer: { notesVersion: thing.id } };
});

/** The cautions were ticked on a device, maybe a while ago; the first ticking counts. */
export const safetyTicksHandler = thingHandler(safetyTicksSchema, async (on, ticks) => {
  await needOwnVisit(on, ticks.visitId);
  const visits = createVisitRepository(on.trx);
  const visit = await visits.find(ticks.visitId);
  if (!visit) throw notFound();
  // A phone's clock may be fast; nothing was ticked in the future.
  const atMs = Math.min(ticks.tickedAtMs, on.nowMs, visit.safetyTickedAtMs ?? Infinity);
  await visits.setSafetyTickedAt(visit.id, atMs);
  return { status: 'applied', answer: { safetyTickedAtMs: atMs } };
});
