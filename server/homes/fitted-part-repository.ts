import type { Knex } from 'knex';
import type { FittedPart, NewFittedPart, RemovedPart } from '#shared/schemas/homes.ts';

/** A part on a machine, naming its rating by id. */
export type StoredPart = NewFittedPart &
  Pick<FittedPart, 'id' | 'removedAtMs' | 'removedWhy'> & { machineId: string };

type PartRow = {
  id: string;
  machine_id: string;
  rating_id: string;
  visit_id: string | null;
  fitted_at_ms: number | string;
  supplier: string;
  lot: string;
  removed_at_ms: number | string | null;
  removed_why: string;
};

export type FittedPartRepository = ReturnType<typeof createFittedPartRepository>;

export function createFittedPartRepository(db: Knex) {
  return {
    /** Newest first. */
    async listByMachine(machineId: string): Promise<StoredPart[]> {
      const rows = await db<PartRow>('fitted_parts')
        .where({ machine_id: machineId })
        .orderBy('fitted_at_ms', 'desc');
      return rows.map(toPart);
    },

    async insert(part: StoredPart): Promise<void> {
      await db('fitted_parts').insert(toRow(part));
    },

    async remove(id: string, { removedAtMs, removedWhy }: RemovedPart): Promise<void> {
      await db('fitted_parts')
        .where({ id })
        .update({ removed_at_ms: removedAtMs, removed_why: removedWhy });
    },
  };
}

function toPart(row: PartRow): StoredPart {
  return {
    id: row.id,
    machineId: row.machine_id,
    ratingId: row.rating_id,
    visitId: row.visit_id,
    fittedAtMs: Number(row.fitted_at_ms),
    supplier: row.supplier,
    lot: row.lot,
    removedAtMs: row.removed_at_ms === null ? null : Number(row.removed_at_ms),
    removedWhy: row.removed_why,
  };
}

function toRow(part: StoredPart): PartRow {
  return {
    id: part.id,
    machine_id: part.machineId,
    rating_id: part.ratingId,
    visit_id: part.visitId,
    fitted_at_ms: part.fittedAtMs,
    supplier: part.supplier,
    lot: part.lot,
    removed_at_ms: part.removedAtMs,
    removed_why: part.removedWhy,
  };
}
