import { useMutation, useQueryClient } from '@tanstack/react-query';
import { shopSchema, type ShopChange } from '#shared/schemas/people.ts';
import { putJson } from './http.ts';

/** The shop itself comes with the session; a change makes the session stale. */
export function useChangeShop() {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (change: ShopChange) => putJson(shopSchema, '/api/shop', change),
    onSuccess: () => queryClient.invalidateQueries({ queryKey: ['session'] }),
  });
}
