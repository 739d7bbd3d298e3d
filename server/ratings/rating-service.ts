import { randomUUID } from 'node:crypto';
import { notFound } from '#server/errors.ts';
import type { NewRating, StoredRating } from '#shared/schemas/ratings.ts';
import type { RatingRepository } from './rating-repository.ts';

export type RatingService = ReturnType<typeof createRatingService>;

export function createRatingService(ratings: RatingRepository) {
  return {
    list: ratings.list,

    async create(asked: NewRating): Promise<StoredRating> {
      const rating = { ...asked, id: randomUUID() };
      await ratings.insert(rating);
      return rating;
    },

    /** Runs judged before keep the figures that they were judged by. */
    async change(id: string, asked: NewRating): Promise<StoredRating> {
      if (!(await ratings.find(id))) throw notFound();
      const rating = { ...asked, id };
      await ratings.update(rating);
      return rating;
    },
  };
}
