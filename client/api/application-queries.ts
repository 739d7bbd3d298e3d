import { createQueryClient } from './query-client.ts';

/** The one of everything behind the sign-in. */
export const applicationQueries = createQueryClient();
