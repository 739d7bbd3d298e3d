import type { Knex } from 'knex';
import type { StoredRating } from '#shared/schemas/ratings.ts';

type RatingRow = Omit<StoredRating, 'opensTol' | 'closesTol'> & {
  opens_tol: number;
  closes_tol: number | null;
};

export type RatingRepository = ReturnType<typeof createRatingRepository>;

/** Temperatures stay in the unit they were typed in. */
export function createRatingRepository(db: Knex) {
  return {
    async list(): Promise<StoredRating[]> {
      return (await db<RatingRow>('ratings').orderBy(['kind', 'name'])).map(toRating);
    },

    async listByIds(ids: readonly string[]): Promise<StoredRating[]> {
      return (await db<RatingRow>('ratings').whereIn('id', ids)).map(toRating);
    },

    async find(id: string): Promise<StoredRating | undefined> {
      const row = await db<RatingRow>('ratings').where({ id }).first();
      return row && toRating(row);
    },

    async insert(rating: StoredRating): Promise<void> {
      await db('ratings').insert(toRow(rating));
    },

    async update(rating: StoredRating): Promise<void> {
      await db('ratings').where({ id: rating.id }).update(toRow(rating));
    },
  };
}

function toRating({ opens_tol, closes_tol, ...row }: RatingRow): StoredRating {
  return { ...row, opensTol: opens_tol, closesTol: closes_tol };
}

function toRow({ opensTol, closesTol, ...rating }: StoredRating): RatingRow {
  return { ...rating, opens_tol: opensTol, closes_tol: closesTol };
}
