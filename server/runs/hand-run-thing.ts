import { AppError } from '#server/errors.ts';
import {
  needOwnVisit,
  thingHandler,
  type Applied,
  type ApplyOn,
} from '#server/sendings/thing-handler.ts';
import type { RunEvent } from '#shared/recorder/run-event.ts';
import { runEventSchema } from '#shared/schemas/hand-run.ts';
import { createHandRunRepository, type HandRunOwner } from './hand-run-repository.ts';

/** Makes the runs of all events that have ended and are none yet. */
export type MakeEnded = () => Promise<void>;

/**
 * Events of runs taken by hand. With the last one the run is made, after the commit; the first of another run makes
 * good what a crash came between.
 */
export function runEventHandler(makeEnded: MakeEnded) {
  return thingHandler(runEventSchema, (on, event) => apply(on, event, makeEnded));
}

async function apply(on: ApplyOn, event: RunEvent, makeEnded: MakeEnded): Promise<Applied> {
  const handRuns = createHandRunRepository(on.trx);
  const owner = await ownerOf(on, event);
  // The chain sees to it that nothing is left out; one that was refused leaves a hole.
  if (event.n <= (await handRuns.lastN(event.runId))) throw outOfPlace();
  if (await handRuns.isOver(event.runId)) throw over();
  await handRuns.insert(withClocks(event, on), owner, on.nowMs);
  const answer = { runId: event.runId };
  const isEdge = event.kind === 'end' || event.kind === 'start';
  return { status: 'applied', answer, ...(isEdge && { afterwards: makeEnded }) };
}

/** The end says what both clocks said as it came: a run without signal has nothing else to check its clock by. */
function withClocks(event: RunEvent, { deviceNowMs, nowMs }: ApplyOn): RunEvent {
  if (event.kind !== 'end') return event;
  const reached = deviceNowMs === null ? undefined : { serverMs: nowMs, phoneMs: deviceNowMs };
  return { ...event, reached };
}

/** A run belongs to whoever began it; nobody else adds to it. @throws {AppError} may not */
async function ownerOf(on: ApplyOn, event: RunEvent): Promise<HandRunOwner> {
  const known = await createHandRunRepository(on.trx).ownerOf(event.runId);
  if (known && known.userId !== on.person.id) throw outOfPlace();
  if (known) return known;
  if (event.kind !== 'start') throw outOfPlace();
  await needOwnVisit(on, event.visitId);
  return { userId: on.person.id, visitId: event.visitId };
}

function outOfPlace(): AppError {
  return new AppError(409, 'out-of-place', 'This does not follow on what came of this run before.');
}

function over(): AppError {
  return new AppError(409, 'run-over', 'This run was ended before.');
}
