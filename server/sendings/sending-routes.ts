import { Router } from 'express';
import { personOf } from '#server/people/signed-in.ts';
import { validate } from '#server/validate.ts';
import { sendingsSchema, type SendingsAnswer } from '#shared/schemas/sendings.ts';
import type { SendingService } from './sending-service.ts';

export function sendingRoutes(sendings: SendingService, now: () => Date): Router {
  const router = Router();

  router.post('/sendings', async (req, res) => {
    const { deviceId, things } = validate(sendingsSchema, req.body);
    const answers = await sendings.takeAll({ person: personOf(req), deviceId }, things);
    const answer: SendingsAnswer = { serverNowMs: now().getTime(), answers };
    res.json(answer);
  });

  return router;
}
