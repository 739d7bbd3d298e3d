import type { Knex } from 'knex';
import { HEAT_SETTINGS } from '#shared/schemas/homes.ts';
import type { HeatSetting, NewSpecifiedRating } from '#shared/schemas/homes.ts';

type SpecifiedRow = {
  machine_id: string;
  setting: HeatSetting;
  rating_id: string;
  limit_rating_id: string | null;
};

export type SpecifiedRatingRepository = ReturnType<typeof createSpecifiedRatingRepository>;

/** What a machine is specified to have, one row a heat setting. */
export function createSpecifiedRatingRepository(db: Knex) {
  return {
    /** Highest heat first. */
    async listByMachine(machineId: string): Promise<NewSpecifiedRating[]> {
      const rows = await db<SpecifiedRow>('specified_ratings').where({ machine_id: machineId });
      return rows
        .map(({ setting, rating_id, limit_rating_id }) => ({
          setting,
          ratingId: rating_id,
          limitRatingId: limit_rating_id,
        }))
        .sort((a, b) => HEAT_SETTINGS.indexOf(a.setting) - HEAT_SETTINGS.indexOf(b.setting));
    },

    async put(machineId: string, specified: NewSpecifiedRating): Promise<void> {
      await db('specified_ratings')
        .insert({
          machine_id: machineId,
          setting: specified.setting,
          rating_id: specified.ratingId,
          limit_rating_id: specified.limitRatingId,
        })
        .onConflict(['machine_id', 'setting'])
        .merge();
    },
  };
}
