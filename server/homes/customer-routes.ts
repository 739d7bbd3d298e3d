import { Router } from 'express';
import { validate } from '#server/validate.ts';
import { newCustomerSchema } from '#shared/schemas/homes.ts';
import type { CustomerService } from './customer-service.ts';

export function customerRoutes(customers: CustomerService): Router {
  const router = Router();

  router.get('/customers', async (_req, res) => {
    res.json(await customers.list());
  });

  router.post('/customers', async (req, res) => {
    res.status(201).json(await customers.create(validate(newCustomerSchema, req.body)));
  });

  router.get('/customers/:id', async (req, res) => {
    res.json(await customers.get(req.params.id));
  });

  router.put('/customers/:id', async (req, res) => {
    const change = validate(newCustomerSchema, req.body);
    res.json(await customers.change(req.params.id, change));
  });

  return router;
}
