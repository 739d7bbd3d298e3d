import { fieldFault } from '#server/errors.ts';
import type { Person, Shop, ShopCard, ShopChange } from '#shared/schemas/people.ts';
import type { Audit } from './audit-repository.ts';
import type { ShopRepository } from './shop-repository.ts';

export type ShopService = ReturnType<typeof createShopService>;

export function createShopService(shops: ShopRepository, audit: Audit) {
  return {
    /** The shop is made together with its first owner, so whoever is signed in has one. */
    async get(): Promise<Shop> {
      const shop = await shops.find();
      if (!shop) throw new Error('there are people but no shop row');
      return shop;
    },

    async change(by: Person, change: ShopChange): Promise<Shop> {
      if (!isZone(change.zone)) {
        throw fieldFault('zone', 'Enter a time zone such as America/New_York');
      }
      await shops.update(change);
      await audit({ userId: by.id, event: 'shop_changed', subject: 'shop' });
      return change;
    },

    /** For the sign-in page; empty words where no shop was set up yet. */
    async card(): Promise<ShopCard> {
      const shop = await shops.find();
      return { name: shop?.name ?? '', town: shop?.town ?? '' };
    },
  };
}

/** Whether the platform knows this IANA zone. */
export function isZone(zone: string): boolean {
  try {
    return new Intl.DateTimeFormat('en', { timeZone: zone }).resolvedOptions().timeZone !== '';
  } catch (error) {
    if (error instanceof RangeError) return false;
    throw error;
  }
}
