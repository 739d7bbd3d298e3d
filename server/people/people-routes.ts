import { Router } from 'express';
import { validate } from '#server/validate.ts';
import { newPersonSchema } from '#shared/schemas/people.ts';
import type { PeopleService } from './people-service.ts';
import { personOf } from './signed-in.ts';

export function peopleRoutes(people: PeopleService): Router {
  const router = Router();

  router.get('/people', async (_req, res) => {
    res.json(await people.list());
  });

  router.post('/people', async (req, res) => {
    const person = await people.create(personOf(req), validate(newPersonSchema, req.body));
    res.status(201).json(person);
  });

  router.post('/people/:id/disable', async (req, res) => {
    res.json(await people.disable(personOf(req), req.params.id));
  });

  router.post('/people/:id/enable', async (req, res) => {
    res.json(await people.enable(personOf(req), req.params.id));
  });

  router.get('/technicians', async (_req, res) => {
    res.json(await people.listTechnicians());
  });

  return router;
}
