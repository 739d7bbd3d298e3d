import type { Knex } from 'knex';
import type { Machine } from '#shared/schemas/homes.ts';

type MachineRow = Pick<
  Machine,
  'id' | 'make' | 'model' | 'serial' | 'fuel' | 'control' | 'place'
> & {
  home_id: string;
  rated_volts: number | null;
  rated_watts: number | null;
};

export type MachineRepository = ReturnType<typeof createMachineRepository>;

export function createMachineRepository(db: Knex) {
  return {
    async listByHomes(homeIds: readonly string[]): Promise<Machine[]> {
      const rows = await db<MachineRow>('machines')
        .whereIn('home_id', homeIds)
        .orderBy(['make', 'model', 'id']);
      return rows.map(toMachine);
    },

    async listByIds(ids: readonly string[]): Promise<Machine[]> {
      return (await db<MachineRow>('machines').whereIn('id', ids)).map(toMachine);
    },

    async find(id: string): Promise<Machine | undefined> {
      const row = await db<MachineRow>('machines').where({ id }).first();
      return row && toMachine(row);
    },

    async insert(machine: Machine): Promise<void> {
      await db('machines').insert(toRow(machine));
    },

    async update(machine: Machine): Promise<void> {
      await db('machines').where({ id: machine.id }).update(toRow(machine));
    },
  };
}

function toMachine({ home_id, rated_volts, rated_watts, ...row }: MachineRow): Machine {
  return { ...row, homeId: home_id, ratedVolts: rated_volts, ratedWatts: rated_watts };
}

function toRow({ homeId, ratedVolts, ratedWatts, ...machine }: Machine): MachineRow {
  return { ...machine, home_id: homeId, rated_volts: ratedVolts, rated_watts: ratedWatts };
}
