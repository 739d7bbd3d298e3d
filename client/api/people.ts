import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { z } from 'zod';
import { personSchema, type NewPerson } from '#shared/schemas/people.ts';
import { fetchJson, postJson } from './http.ts';

const technicianSchema = personSchema.pick({ id: true, name: true });

export function peopleQuery() {
  return queryOptions({
    queryKey: ['people'],
    queryFn: ({ signal }) => fetchJson(z.array(personSchema), '/api/people', { signal }),
  });
}

/** Whom a visit can be given to. */
export function techniciansQuery() {
  return queryOptions({
    queryKey: ['technicians'],
    queryFn: ({ signal }) => fetchJson(z.array(technicianSchema), '/api/technicians', { signal }),
  });
}

function useStalePeople() {
  const queryClient = useQueryClient();
  return () =>
    Promise.all([
      queryClient.invalidateQueries({ queryKey: ['people'] }),
      queryClient.invalidateQueries({ queryKey: ['technicians'] }),
    ]);
}

export function useAddPerson() {
  const onSuccess = useStalePeople();
  return useMutation({
    mutationFn: (person: NewPerson) => postJson(personSchema, '/api/people', person),
    onSuccess,
  });
}

export function useDisablePerson() {
  const onSuccess = useStalePeople();
  return useMutation({
    mutationFn: (id: string) => postJson(personSchema, `/api/people/${id}/disable`),
    onSuccess,
  });
}

export function useEnablePerson() {
  const onSuccess = useStalePeople();
  return useMutation({
    mutationFn: (id: string) => postJson(personSchema, `/api/people/${id}/enable`),
    onSuccess,
  });
}
