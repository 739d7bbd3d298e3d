import { Router } from 'express';
import { AppError } from '#server/errors.ts';
import { personOf } from '#server/people/signed-in.ts';
import { validate } from '#server/validate.ts';
import { sendingsSchema, type SendingsAnswer } from '#shared/schemas/sendings.ts';
import type { SendingService } from './sending-service.ts';

export function sendingRoutes(sendings: SendingService, now: () => Date): Router {
  const router = Router();

  router.post('/sendings', async (req, res) => {
    const { deviceId, personId, deviceNowMs, things } = validate(sendingsSchema, req.body);
    const person = personOf(req);
    if (personId !== null && personId !== person.id) throw otherPerson();
    const answers = await sendings.takeAll({ person, deviceId, deviceNowMs }, things);
    const answer: SendingsAnswer = { serverNowMs: now().getTime(), answers };
    res.json(answer);
  });

  return router;
}

/** Two people share a phone, and somebody else signed in in another tab: nothing is done in the wrong name. */
function otherPerson(): AppError {
  return new AppError(409, 'other-person', 'Somebody else is signed in here now.');
}
