import { Router } from 'express';
import { personOf } from '#server/people/signed-in.ts';
import { validate } from '#server/validate.ts';
import { newHomeSchema } from '#shared/schemas/homes.ts';
import type { HomeService } from './home-service.ts';

/** `ownHomeIds`: the homes that a technician's visits lead to. */
export function homeRoutes(
  homes: HomeService,
  ownHomeIds: (technicianId: string) => Promise<string[]>,
): Router {
  const router = Router();

  router.get('/homes', async (req, res) => {
    const { id, role } = personOf(req);
    res.json(await homes.list(role === 'technician' ? await ownHomeIds(id) : null));
  });

  router.post('/homes', async (req, res) => {
    res.status(201).json(await homes.create(validate(newHomeSchema, req.body)));
  });

  router.get('/homes/:id', async (req, res) => {
    res.json(await homes.get(req.params.id));
  });

  router.put('/homes/:id', async (req, res) => {
    res.json(await homes.change(req.params.id, validate(newHomeSchema, req.body)));
  });

  return router;
}
