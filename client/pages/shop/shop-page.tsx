import { useQuery } from '@tanstack/react-query';
import { Navigate } from 'react-router-dom';
import { peopleQuery } from '../../api/people.ts';
import { DeskPage } from '../../components/frame.tsx';
import { KeyLink } from '../../components/key-link.tsx';
import { SectionHead } from '../../components/section-head.tsx';
import { Failed, Waiting } from '../../components/waiting.tsx';
import { useSession } from '../frame/session-context.ts';
import { PeopleRows } from './people-rows.tsx';
import { ShopForm } from './shop-form.tsx';

export function ShopPage() {
  const session = useSession();
  if (session.person.role !== 'owner') return <Navigate to="/account" replace />;
  return (
    <DeskPage>
      <ShopForm shop={session.shop} />
      <div className="pt-11">
        <People ownId={session.person.id} />
      </div>
    </DeskPage>
  );
}

function People({ ownId }: { ownId: string }) {
  const people = useQuery(peopleQuery());
  const working = people.data?.filter(({ disabledAtMs }) => disabledAtMs === null).length;
  return (
    <section>
      <SectionHead state={working !== undefined && `${working} may sign in`}>People</SectionHead>
      {people.isPending && <Waiting>Fetching the people…</Waiting>}
      {people.isError && <Failed error={people.error} onRetry={people.refetch} />}
      {people.data && <PeopleRows people={people.data} ownId={ownId} />}
      <div className="pt-5">
        <KeyLink to="/shop/people/new">Add a person</KeyLink>
      </div>
    </section>
  );
}
