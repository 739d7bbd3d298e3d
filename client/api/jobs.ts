import { keepPreviousData, queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import {
  jobListSchema,
  jobPageSchema,
  visitSchema,
  type JobChange,
  type NewJob,
  type NewVisit,
} from '#shared/schemas/jobs.ts';
import { fetchJson, postJson, putJson } from './http.ts';

/** As in the address of the Jobs page; an empty string does not narrow. */
export type JobFilter = { find: string; state: string; technician: string; callbacks: string };

export function jobsQuery(filter: JobFilter) {
  const given = Object.entries(filter).filter(([, value]) => value !== '');
  const search = new URLSearchParams(given).toString();
  return queryOptions({
    queryKey: ['jobs', 'list', filter],
    queryFn: ({ signal }) =>
      fetchJson(jobListSchema, search ? `/api/jobs?${search}` : '/api/jobs', { signal }),
    placeholderData: keepPreviousData,
  });
}

export function jobQuery(id: string) {
  return queryOptions({
    queryKey: ['jobs', id],
    queryFn: ({ signal }) => fetchJson(jobPageSchema, `/api/jobs/${id}`, { signal }),
    meta: { url: `/api/jobs/${id}` },
  });
}

export function useTakeJob() {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (job: NewJob) => postJson(jobPageSchema, '/api/jobs', job),
    onSuccess: (job) => {
      queryClient.setQueryData(jobQuery(job.id).queryKey, job);
      return queryClient.invalidateQueries({ queryKey: ['jobs', 'list'] });
    },
  });
}

export function useChangeJob(id: string) {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (change: JobChange) => putJson(jobPageSchema, `/api/jobs/${id}`, change),
    onSuccess: (job) => {
      queryClient.setQueryData(jobQuery(id).queryKey, job);
      return Promise.all([
        queryClient.invalidateQueries({ queryKey: ['jobs', 'list'] }),
        queryClient.invalidateQueries({ queryKey: ['rounds'] }),
        queryClient.invalidateQueries({ queryKey: ['visits'] }),
      ]);
    },
  });
}

/** Books a visit on a job; the job is an argument, since a call books on a job that it has just taken. */
export function useBookVisit() {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: ({ jobId, visit }: { jobId: string; visit: NewVisit }) =>
      postJson(visitSchema, `/api/jobs/${jobId}/visits`, visit),
    onSuccess: () =>
      Promise.all(
        ['jobs', 'rounds'].map((noun) => queryClient.invalidateQueries({ queryKey: [noun] })),
      ),
  });
}
