import { Router } from 'express';
import { z } from 'zod';
import { personOf } from '#server/people/signed-in.ts';
import { validate } from '#server/validate.ts';
import {
  jobChangeSchema,
  jobStateSchema,
  newJobSchema,
  newVisitSchema,
} from '#shared/schemas/jobs.ts';
import { idSchema, words } from '#shared/schemas/primitives.ts';
import type { JobService } from './job-service.ts';
import type { VisitService } from './visit-service.ts';

/** An empty field of the search form narrows nothing. */
const emptyIsNull = <Schema extends z.ZodType>(schema: Schema) =>
  z.preprocess((value) => (value === '' ? null : value), schema.nullable().default(null));

const jobFilterSchema = z.object({
  find: emptyIsNull(words(200)),
  state: emptyIsNull(jobStateSchema),
  technician: emptyIsNull(idSchema),
  callbacks: z.enum(['', 'yes', 'no']).default('no'),
});

export function jobRoutes(jobs: JobService, visits: VisitService): Router {
  const router = Router();

  router.get('/jobs', async (req, res) => {
    const { id, role } = personOf(req);
    const { find, state, technician, callbacks } = validate(jobFilterSchema, req.query);
    const technicianId = role === 'technician' ? id : technician;
    res.json(await jobs.list({ find, state, technicianId, callbacks: callbacks === 'yes' }));
  });

  router.post('/jobs', async (req, res) => {
    res.status(201).json(await jobs.create(validate(newJobSchema, req.body)));
  });

  router.get('/jobs/:id', async (req, res) => {
    res.json(await jobs.page(req.params.id));
  });

  router.put('/jobs/:id', async (req, res) => {
    res.json(await jobs.change(req.params.id, validate(jobChangeSchema, req.body)));
  });

  router.post('/jobs/:id/visits', async (req, res) => {
    res.status(201).json(await visits.book(req.params.id, validate(newVisitSchema, req.body)));
  });

  return router;
}
