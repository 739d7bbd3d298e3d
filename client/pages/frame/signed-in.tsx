import { useQuery } from '@tanstack/react-query';
import { Navigate, Outlet, useLocation, useMatches } from 'react-router-dom';
import type { Session } from '#shared/schemas/people.ts';
import { isSignedOut } from '../../api/query-client.ts';
import { sessionQuery } from '../../api/session.ts';
import '../../device/start-with-queries.ts';
import { DeskHead, PhoneTabs, SkipLink } from '../../components/frame.tsx';
import { Failed, Waiting } from '../../components/waiting.tsx';
import { DeviceLine } from './device-line.tsx';
import { placesFor } from './places-for.ts';
import { SignInAgain } from './sign-in-again.tsx';

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

function Frame({ session, isSite }: { session: Session; isSite: boolean }) {
  return (
    <div className="flex min-h-dvh flex-col">
      <SkipLink />
      <DeskHead places={placesFor(session.person.role)} who={whoOf(session)} isSite={isSite} />
      <DeviceLine zone={session.shop.zone} />
      <div className="flex-1">
        <Outlet context={session} />
      </div>
      {!isSite && <PhoneTabs />}
      <SignInAgain email={session.person.email} />
    </div>
  );
}
