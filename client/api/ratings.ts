import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { z } from 'zod';
import { ratingSchema, type NewRating } from '#shared/schemas/ratings.ts';
import { fetchJson, postJson, putJson } from './http.ts';

export function ratingsQuery() {
  return queryOptions({
    queryKey: ['ratings'],
    queryFn: ({ signal }) => fetchJson(z.array(ratingSchema), '/api/ratings', { signal }),
    meta: { url: '/api/ratings' },
  });
}

/** Adds a rating, or changes the one with this id. */
export function useSaveRating(id: string | null) {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (rating: NewRating) =>
      id === null
        ? postJson(ratingSchema, '/api/ratings', rating)
        : putJson(ratingSchema, `/api/ratings/${id}`, rating),
    onSuccess: () =>
      Promise.all(
        ['ratings', 'machines'].map((noun) => queryClient.invalidateQueries({ queryKey: [noun] })),
      ),
  });
}
