import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { z } from 'zod';
import { customerSchema, type NewCustomer } from '#shared/schemas/homes.ts';
import { fetchJson, postJson, putJson } from './http.ts';

export function customersQuery() {
  return queryOptions({
    queryKey: ['customers'],
    queryFn: ({ signal }) => fetchJson(z.array(customerSchema), '/api/customers', { signal }),
  });
}

export function customerQuery(id: string) {
  return queryOptions({
    queryKey: ['customers', id],
    queryFn: ({ signal }) => fetchJson(customerSchema, `/api/customers/${id}`, { signal }),
  });
}

export function useAddCustomer() {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (customer: NewCustomer) => postJson(customerSchema, '/api/customers', customer),
    onSuccess: (customer) => {
      queryClient.setQueryData(customerQuery(customer.id).queryKey, customer);
      return queryClient.invalidateQueries({ queryKey: ['customers'], exact: true });
    },
  });
}

export function useChangeCustomer(id: string) {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (customer: NewCustomer) =>
      putJson(customerSchema, `/api/customers/${id}`, customer),
    onSuccess: () =>
      Promise.all(
        ['customers', 'homes', 'machines', 'jobs'].map((noun) =>
          queryClient.invalidateQueries({ queryKey: [noun] }),
        ),
      ),
  });
}
