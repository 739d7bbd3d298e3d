import { queryOptions, useMutation } from '@tanstack/react-query';
import type { SignIn } from '#shared/schemas/people.ts';
import { fetchJson, sendOnly } from './http.ts';

type ShopCard = { name: string; town: string };

/** Checked by hand: the sign-in page goes without the schemas, so that it opens fast. */
const shopCardChecker = {
  parse(answer: unknown): ShopCard {
    const card = typeof answer === 'object' && answer !== null ? answer : {};
    return {
      name: 'name' in card && typeof card.name === 'string' ? card.name : '',
      town: 'town' in card && typeof card.town === 'string' ? card.town : '',
    };
  },
};

/** The shop's name, for whoever stands at the door. */
export function shopCardQuery() {
  return queryOptions({
    queryKey: ['shop-card'],
    queryFn: ({ signal }) => fetchJson(shopCardChecker, '/api/shop-card', { signal }),
    staleTime: Infinity,
  });
}

export function useSignIn() {
  return useMutation({
    mutationFn: (signIn: SignIn) => sendOnly('POST', '/api/session', signIn),
  });
}
