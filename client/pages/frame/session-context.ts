import { useOutletContext } from 'react-router-dom';
import type { Session } from '#shared/schemas/people.ts';

/** Who is signed in, and where: there for every page inside the frame. */
export function useSession(): Session {
  return useOutletContext<Session>();
}

/** Takes calls, books visits, keeps customers and ratings. */
export function mayRunOffice({ person }: Session) {
  return person.role === 'owner' || person.role === 'office';
}
