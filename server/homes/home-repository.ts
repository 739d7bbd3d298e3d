import type { Knex } from 'knex';
import type { Home } from '#shared/schemas/homes.ts';

type HomeRow = {
  id: string;
  customer_id: string;
  address: string;
  town: string;
  access_notes: string;
};

export type HomeRepository = ReturnType<typeof createHomeRepository>;

export function createHomeRepository(db: Knex) {
  return {
    async list(): Promise<Home[]> {
      return (await db<HomeRow>('homes').orderBy(['town', 'address'])).map(toHome);
    },

    async listByIds(ids: readonly string[]): Promise<Home[]> {
      const rows = await db<HomeRow>('homes').whereIn('id', ids).orderBy(['town', 'address']);
      return rows.map(toHome);
    },

    async find(id: string): Promise<Home | undefined> {
      const row = await db<HomeRow>('homes').where({ id }).first();
      return row && toHome(row);
    },

    async insert(home: Home): Promise<void> {
      await db('homes').insert(toRow(home));
    },

    async update(home: Home): Promise<void> {
      await db('homes').where({ id: home.id }).update(toRow(home));
    },
  };
}

function toHome({ id, customer_id, address, town, access_notes }: HomeRow): Home {
  return { id, customerId: customer_id, address, town, accessNotes: access_notes };
}

function toRow({ id, customerId, address, town, accessNotes }: Home): HomeRow {
  return { id, customer_id: customerId, address, town, access_notes: accessNotes };
}
