import type { AppParts } from '#server/app.ts';
import { safetyTicksHandler, visitEditHandler } from '#server/jobs/visit-things.ts';
import { runNoteHandler } from '#server/runs/run-note-thing.ts';
import type { Handlers } from '#server/sendings/apply-once.ts';
import { createSendingService } from '#server/sendings/sending-service.ts';
import type { PeopleWiring } from './wire-people.ts';

/** What devices kept and sent later, each kind to its noun. */
export function wireSendings({ db, now, logger }: AppParts, { audit }: PeopleWiring) {
  const handlers: Handlers = {
    'visit-edit': visitEditHandler,
    'safety-ticks': safetyTicksHandler,
    'run-note': runNoteHandler,
  };
  const onDefect = (error: unknown) => logger.error({ err: error }, 'unexpected error');
  return createSendingService({ db, handlers, audit, now, onDefect });
}
