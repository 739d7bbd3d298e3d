import type { Knex } from 'knex';
import type { Shop } from '#shared/schemas/people.ts';

/** One shop an installation. */
const ONLY = { id: 1 };

type ShopRow = {
  id: number;
  name: string;
  town: string;
  phone: string;
  email: string;
  zone: string;
  unit: 'F' | 'C';
  min_cycles: number;
  is_demo: number | boolean;
};

export type ShopRepository = ReturnType<typeof createShopRepository>;

export function createShopRepository(db: Knex) {
  return {
    async find(): Promise<Shop | undefined> {
      const row = await db<ShopRow>('shop').where(ONLY).first();
      return row && toShop(row);
    },

    async insert(shop: Shop, isDemo: boolean): Promise<void> {
      await db('shop').insert({ ...ONLY, ...toRow(shop), is_demo: isDemo });
    },

    async update(shop: Shop): Promise<void> {
      await db('shop').where(ONLY).update(toRow(shop));
    },
  };
}

function toShop({ name, town, phone, email, zone, unit, min_cycles }: ShopRow): Shop {
  return { name, town, phone, email, zone, unit, minCycles: Number(min_cycles) };
}

function toRow({ minCycles, ...shop }: Shop): Omit<ShopRow, 'id' | 'is_demo'> {
  return { ...shop, min_cycles: minCycles };
}
