import { Router } from 'express';
import { validate } from '#server/validate.ts';
import { newCalibrationSchema } from '#shared/schemas/calibrations.ts';
import { newProbeSchema } from '#shared/schemas/ratings.ts';
import type { ProbeService } from './probe-service.ts';

export function probeRoutes(probes: ProbeService): Router {
  const router = Router();

  router.get('/probes', async (_req, res) => {
    res.json(await probes.list());
  });

  router.post('/probes', async (req, res) => {
    res.status(201).json(await probes.create(validate(newProbeSchema, req.body)));
  });

  router.put('/probes/:id', async (req, res) => {
    res.json(await probes.change(req.params.id, validate(newProbeSchema, req.body)));
  });

  router.get('/calibrations', async (_req, res) => {
    res.json(await probes.listCalibrations());
  });

  router.post('/probes/:id/calibrations', async (req, res) => {
    const asked = validate(newCalibrationSchema, req.body);
    res.status(201).json(await probes.calibrate(req.params.id, asked));
  });

  return router;
}
