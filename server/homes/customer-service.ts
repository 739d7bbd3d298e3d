import { randomUUID } from 'node:crypto';
import { notFound } from '#server/errors.ts';
import type { Customer, NewCustomer } from '#shared/schemas/homes.ts';
import type { CustomerRepository } from './customer-repository.ts';

export type CustomerService = ReturnType<typeof createCustomerService>;

export function createCustomerService(customers: CustomerRepository) {
  async function get(id: string): Promise<Customer> {
    const customer = await customers.find(id);
    if (!customer) throw notFound();
    return customer;
  }

  return {
    list: customers.list,
    get,

    async create(asked: NewCustomer): Promise<Customer> {
      const customer = { ...asked, id: randomUUID() };
      await customers.insert(customer);
      return customer;
    },

    async change(id: string, asked: NewCustomer): Promise<Customer> {
      await get(id);
      const customer = { ...asked, id };
      await customers.update(customer);
      return customer;
    },
  };
}
