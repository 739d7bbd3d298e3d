import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import {
  homeListItemSchema,
  homeListSchema,
  homeSchema,
  type NewHome,
} from '#shared/schemas/homes.ts';
import { fetchJson, postJson, putJson } from './http.ts';

/** Every home with its customer and machines; the page searches in it as one types. */
export function homesQuery() {
  return queryOptions({
    queryKey: ['homes'],
    queryFn: ({ signal }) => fetchJson(homeListSchema, '/api/homes', { signal }),
  });
}

export function homeQuery(id: string) {
  return queryOptions({
    queryKey: ['homes', id],
    queryFn: ({ signal }) => fetchJson(homeListItemSchema, `/api/homes/${id}`, { signal }),
  });
}

export function useAddHome() {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (home: NewHome) => postJson(homeSchema, '/api/homes', home),
    onSuccess: () => queryClient.invalidateQueries({ queryKey: ['homes'] }),
  });
}

export function useChangeHome(id: string) {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (home: NewHome) => putJson(homeListItemSchema, `/api/homes/${id}`, home),
    onSuccess: () =>
      Promise.all(
        ['homes', 'machines', 'jobs'].map((noun) =>
          queryClient.invalidateQueries({ queryKey: [noun] }),
        ),
      ),
  });
}
