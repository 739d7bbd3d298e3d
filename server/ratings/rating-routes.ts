import { Router } from 'express';
import { validate } from '#server/validate.ts';
import { newRatingSchema } from '#shared/schemas/ratings.ts';
import type { RatingService } from './rating-service.ts';

export function ratingRoutes(ratings: RatingService): Router {
  const router = Router();

  router.get('/ratings', async (_req, res) => {
    res.json(await ratings.list());
  });

  router.post('/ratings', async (req, res) => {
    res.status(201).json(await ratings.create(validate(newRatingSchema, req.body)));
  });

  router.put('/ratings/:id', async (req, res) => {
    res.json(await ratings.change(req.params.id, validate(newRatingSchema, req.body)));
  });

  return router;
}
