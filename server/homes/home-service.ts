import { randomUUID } from 'node:crypto';
import { fieldFault, notFound } from '#server/errors.ts';
import type { Home, HomeListItem, NewHome } from '#shared/schemas/homes.ts';
import type { CustomerRepository } from './customer-repository.ts';
import type { HomeRepository } from './home-repository.ts';
import type { MachineRepository } from './machine-repository.ts';

export type HomeService = ReturnType<typeof createHomeService>;

export type HomeParts = {
  homes: HomeRepository;
  customers: CustomerRepository;
  machines: MachineRepository;
};

export function createHomeService({ homes, customers, machines }: HomeParts) {
  /** Each home with whose it is and what stands there. */
  async function withRest(found: Home[]): Promise<HomeListItem[]> {
    const ids = found.map(({ id }) => id);
    const theirs = await customers.listByIds(found.map(({ customerId }) => customerId));
    const there = await machines.listByHomes(ids);
    return found.flatMap((home) => {
      const customer = theirs.find(({ id }) => id === home.customerId);
      const atHome = there.filter(({ homeId }) => homeId === home.id);
      return customer ? [{ ...home, customer, machines: atHome }] : [];
    });
  }

  async function get(id: string): Promise<HomeListItem> {
    const home = await homes.find(id);
    const [listed] = home ? await withRest([home]) : [];
    if (!listed) throw notFound();
    return listed;
  }

  async function checkCustomer(id: string): Promise<void> {
    if (!(await customers.find(id))) throw fieldFault('customerId', 'Choose a customer');
  }

  return {
    /** `ids` null: all of them. */
    list: async (ids: readonly string[] | null): Promise<HomeListItem[]> =>
      withRest(ids === null ? await homes.list() : await homes.listByIds(ids)),

    get,

    async create(asked: NewHome): Promise<Home> {
      await checkCustomer(asked.customerId);
      const home = { ...asked, id: randomUUID() };
      await homes.insert(home);
      return home;
    },

    async change(id: string, asked: NewHome): Promise<HomeListItem> {
      await get(id);
      await checkCustomer(asked.customerId);
      await homes.update({ ...asked, id });
      return get(id);
    },
  };
}
