import type { Role } from '#shared/schemas/people.ts';
import type { Place } from '../../components/frame.tsx';

const PLACES: Place[] = [
  { to: '/rounds', name: 'Rounds', covers: ['/visits'] },
  { to: '/jobs', name: 'Jobs', covers: ['/runs'] },
  { to: '/homes', name: 'Homes', covers: ['/machines', '/customers'] },
  { to: '/ratings', name: 'Ratings', covers: ['/probes'] },
];
const SHOP: Place = { to: '/shop', name: 'Shop' };

/** The places that the head of the desk names: only what the role may open. */
export function placesFor(role: Role): Place[] {
  return role === 'owner' ? [...PLACES, SHOP] : PLACES;
}
