import { Router } from 'express';
import { z } from 'zod';
import { personOf } from '#server/people/signed-in.ts';
import { validate } from '#server/validate.ts';
import { daySchema } from '#shared/schemas/primitives.ts';
import type { RoundsService } from './rounds-service.ts';
import type { VisitService } from './visit-service.ts';

const roundsQuerySchema = z.object({ day: daySchema.nullable().default(null) });

export function visitRoutes(visits: VisitService, rounds: RoundsService): Router {
  const router = Router();

  router.get('/visits/:id', async (req, res) => {
    res.json(await visits.page(personOf(req), req.params.id));
  });

  router.post('/visits/:id/safety', async (req, res) => {
    res.json(await visits.tickSafety(personOf(req), req.params.id));
  });

  router.get('/rounds', async (req, res) => {
    const { day } = validate(roundsQuerySchema, req.query);
    res.json(await rounds.ofDay(personOf(req), day));
  });

  return router;
}
