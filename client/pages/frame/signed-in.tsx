import { useQuery } from '@tanstack/react-query';
import { Navigate, Outlet, useLocation, useMatches } from 'react-router-dom';
import type { Session } from '#shared/schemas/people.ts';
import { isSignedOut } from '../../api/query-client.ts';
import { sessionQuery } from '../../api/session.ts';
import { DeskHead, PhoneTabs, SkipLink, type Place } from '../../components/frame.tsx';
import { Failed, Waiting } from '../../components/waiting.tsx';
import { SignInAgain } from './sign-in-again.tsx';

const PLACES: Place[] = [
  { to: '/rounds', name: 'Rounds' },
  { to: '/jobs', name: 'Jobs' },
  { to: '/homes', name: 'Homes' },
  { to: '/ratings', name: 'Ratings' },
];

/** The head of the desk names only what the role may open. */
function placesOf({ person }: Session): Place[] {
  return person.role === 'owner' ? [...PLACES, { to: '/shop', name: 'Shop' }] : PLACES;
}

function whoOf({ person }: Session) {
  return person.role === 'technician' ? person.name : `${person.name}, ${person.role}`;
}

function isSiteHandle(handle: unknown) {
  return typeof handle === 'object' && handle !== null && 'isSite' in handle;
}

/** The frame of everything behind the sign-in. */
export function SignedIn() {
  const session = useQuery(sessionQuery());
  const location = useLocation();
  const isSite = useMatches().some(({ handle }) => isSiteHandle(handle));

  if (session.data) return <Frame session={session.data} isSite={isSite} />;
  if (session.isPending) {
    return (
      <main className="px-4 desk:px-12">
        <Waiting>Opening…</Waiting>
      </main>
    );
  }
  if (isSignedOut(session.error)) {
    const from = `${location.pathname}${location.search}`;
    return (
      <Navigate
        to={from === '/' ? '/sign-in' : `/sign-in?to=${encodeURIComponent(from)}`}
        replace
      />
    );
  }
  return (
    <main className="px-4 desk:px-12">
      <Failed error={session.error} onRetry={session.refetch} />
    </main>
  );
}

const OWN_KEY = /^\/(rounds|jobs|homes|more)(\/|$)/;

function Frame({ session, isSite }: { session: Session; isSite: boolean }) {
  const { pathname } = useLocation();
  return (
    <div className="flex min-h-dvh flex-col">
      <SkipLink />
      <DeskHead places={placesOf(session)} who={whoOf(session)} isSite={isSite} />
      <div className="flex-1">
        <Outlet context={session} />
      </div>
      {!isSite && <PhoneTabs isMore={!OWN_KEY.test(pathname)} />}
      <SignInAgain email={session.person.email} />
    </div>
  );
}
