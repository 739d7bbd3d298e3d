import { Router } from 'express';
import { validate } from '#server/validate.ts';
import {
  newFittedPartSchema,
  newMachineSchema,
  newSpecifiedRatingSchema,
  removedPartSchema,
} from '#shared/schemas/homes.ts';
import type { RunCard } from '#shared/schemas/runs.ts';
import type { MachineService } from './machine-service.ts';

export function machineRoutes(
  machines: MachineService,
  runsOfMachine: (machineId: string) => Promise<RunCard[]>,
): Router {
  const router = Router();

  router.post('/machines', async (req, res) => {
    res.status(201).json(await machines.create(validate(newMachineSchema, req.body)));
  });

  router.get('/machines/:id', async (req, res) => {
    res.json(await machines.page(req.params.id));
  });

  router.put('/machines/:id', async (req, res) => {
    res.json(await machines.change(req.params.id, validate(newMachineSchema, req.body)));
  });

  router.put('/machines/:id/specified', async (req, res) => {
    const specified = validate(newSpecifiedRatingSchema, req.body);
    res.json(await machines.specify(req.params.id, specified));
  });

  router.post('/machines/:id/parts', async (req, res) => {
    const part = validate(newFittedPartSchema, req.body);
    res.status(201).json(await machines.fit(req.params.id, part));
  });

  router.post('/machines/:id/parts/:partId/remove', async (req, res) => {
    const removed = validate(removedPartSchema, req.body);
    res.json(await machines.remove(req.params.id, req.params.partId, removed));
  });

  router.get('/machines/:id/runs', async (req, res) => {
    res.json(await runsOfMachine(req.params.id));
  });

  return router;
}
