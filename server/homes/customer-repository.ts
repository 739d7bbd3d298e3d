import type { Knex } from 'knex';
import type { Customer } from '#shared/schemas/homes.ts';

export type CustomerRepository = ReturnType<typeof createCustomerRepository>;

/** The columns are named as the fields are. */
export function createCustomerRepository(db: Knex) {
  return {
    async list(): Promise<Customer[]> {
      return (await db<Customer>('customers').orderBy('name')).map(toCustomer);
    },

    async listByIds(ids: readonly string[]): Promise<Customer[]> {
      return (await db<Customer>('customers').whereIn('id', ids)).map(toCustomer);
    },

    async find(id: string): Promise<Customer | undefined> {
      const row = await db<Customer>('customers').where({ id }).first();
      return row && toCustomer(row);
    },

    async insert(customer: Customer): Promise<void> {
      await db('customers').insert(toCustomer(customer));
    },

    async update(customer: Customer): Promise<void> {
      await db('customers').where({ id: customer.id }).update(toCustomer(customer));
    },
  };
}

function toCustomer({ id, name, phone, email, notes }: Customer): Customer {
  return { id, name, phone, email, notes };
}
