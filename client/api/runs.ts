import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { runPageSchema, type RunPage } from '#shared/schemas/runs.ts';
import { fetchBytes, fetchJson, postJson } from './http.ts';

export function runQuery(id: string) {
  return queryOptions({
    queryKey: ['runs', id],
    queryFn: ({ signal }) => fetchJson(runPageSchema, `/api/runs/${id}`, { signal }),
    meta: { url: `/api/runs/${id}` },
  });
}

/** Readings do not change once a run is stored, and comparing a million of them costs more than it saves. */
const READINGS = { staleTime: Infinity, structuralSharing: false } as const;

/** What each of at most `columns` stretches of the run reaches: [s, lowest, highest], °C. */
export type TraceColumn = [timeS: number, lowC: number, highC: number];

const FIRST_COLUMNS = 1500;

/** The coarse level, which is drawn at once. */
export function traceQuery(id: string, columns = FIRST_COLUMNS) {
  return queryOptions({
    queryKey: ['runs', id, 'trace', columns],
    queryFn: async ({ signal }) =>
      columnsOf(await fetchBytes(`/api/runs/${id}/trace?columns=${columns}`, { signal })),
    ...READINGS,
  });
}

/** Every reading, in °C. */
export function samplesQuery(id: string) {
  return queryOptions({
    queryKey: ['runs', id, 'samples'],
    queryFn: async ({ signal }) =>
      samplesOf(await fetchBytes(`/api/runs/${id}/samples`, { signal })),
    ...READINGS,
    gcTime: 60_000,
  });
}

/** Every browser in use is little-endian, as the octets are. */
function columnsOf(octets: ArrayBuffer): TraceColumn[] {
  const values = new Float64Array(octets);
  return Array.from({ length: values.length / 3 }, (_, i) => [
    values[3 * i]!,
    values[3 * i + 1]!,
    values[3 * i + 2]!,
  ]);
}

function samplesOf(octets: ArrayBuffer): { timesS: Float64Array; tempsC: Float64Array } {
  const values = new Float64Array(octets);
  const count = values.length / 2;
  return { timesS: values.subarray(0, count), tempsC: values.subarray(count) };
}

export function runFileUrl(id: string): string {
  return `/api/runs/${id}/file`;
}

/** Each of these answers with the whole run page. */
function useRunChange<Change>(id: string, send: (change: Change) => Promise<RunPage>) {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: send,
    onSuccess: (run) => {
      queryClient.setQueryData(runQuery(id).queryKey, run);
      return Promise.all(
        ['visits', 'jobs', 'machines', 'rounds'].map((noun) =>
          queryClient.invalidateQueries({ queryKey: [noun] }),
        ),
      );
    },
  });
}

/** Judges the run by another rating; null: by what the machine is specified to have. */
export function useJudgeAgain(id: string) {
  return useRunChange(id, (ratingId: string | null) =>
    postJson(runPageSchema, `/api/runs/${id}/analyses`, { ratingId }),
  );
}
