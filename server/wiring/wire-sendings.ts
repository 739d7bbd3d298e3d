import type { AppParts } from '#server/app.ts';
import { safetyTicksHandler, visitEditHandler } from '#server/jobs/visit-things.ts';
import { runEventHandler } from '#server/runs/hand-run-thing.ts';
import { runNoteHandlers } from '#server/runs/run-note-things.ts';
import type { Handlers } from '#server/sendings/apply-once.ts';
import { createSendingService } from '#server/sendings/sending-service.ts';
import type { PeopleWiring } from './wire-people.ts';
import type { RunsWiring } from './wire-runs.ts';

/** What devices kept and sent later, each kind to its noun. */
export function wireSendings(
  { db, now, logger }: AppParts,
  { audit }: PeopleWiring,
  { handRuns }: Pick<RunsWiring, 'handRuns'>,
) {
  const handlers: Handlers = {
    'visit-edit': visitEditHandler,
    'safety-ticks': safetyTicksHandler,
    ...runNoteHandlers(handRuns.makeEnded),
    'run-event': runEventHandler(handRuns.makeEnded),
  };
  const onDefect = (error: unknown) => logger.error({ err: error }, 'unexpected error');
  return createSendingService({ db, handlers, audit, now, onDefect });
}
