import { Router } from 'express';
import { validate } from '#server/validate.ts';
import { shopChangeSchema } from '#shared/schemas/people.ts';
import type { ShopService } from './shop-service.ts';
import { personOf } from './signed-in.ts';

export function shopRoutes(shop: ShopService): Router {
  const router = Router();

  router.get('/shop', async (_req, res) => {
    res.json(await shop.get());
  });

  router.put('/shop', async (req, res) => {
    res.json(await shop.change(personOf(req), validate(shopChangeSchema, req.body)));
  });

  router.get('/shop-card', async (_req, res) => {
    res.json(await shop.card());
  });

  router.get('/health', (_req, res) => {
    res.json({ ok: true });
  });

  return router;
}
