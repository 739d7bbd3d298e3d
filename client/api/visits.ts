import { queryOptions } from '@tanstack/react-query';
import { roundsSchema, visitPageSchema } from '#shared/schemas/jobs.ts';
import { fetchJson } from './http.ts';

export function visitQuery(id: string) {
  return queryOptions({
    queryKey: ['visits', id],
    queryFn: ({ signal }) => fetchJson(visitPageSchema, `/api/visits/${id}`, { signal }),
    meta: { url: `/api/visits/${id}` },
  });
}

/** The visits of a day, `2026-03-04` in the shop's zone; null: the server's today. */
export function roundsQuery(day: string | null) {
  const url = day === null ? '/api/rounds' : `/api/rounds?day=${day}`;
  return queryOptions({
    queryKey: ['rounds', day],
    queryFn: ({ signal }) => fetchJson(roundsSchema, url, { signal }),
    meta: { url },
  });
}
