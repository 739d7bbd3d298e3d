import { useQuery } from '@tanstack/react-query';
import { Link, useSearchParams } from 'react-router-dom';
import type { HomeListItem } from '#shared/schemas/homes.ts';
import { homesQuery } from '../../api/homes.ts';
import { Cells, TextField } from '../../components/field.tsx';
import { DeskPage } from '../../components/frame.tsx';
import { KeyLink } from '../../components/key-link.tsx';
import { PageHeading } from '../../components/page-heading.tsx';
import { Empty } from '../../components/printed-paper.tsx';
import { Failed, Waiting } from '../../components/waiting.tsx';
import { machineWords } from '../../format/job-words.ts';
import { matchesWords } from '../../format/matches-words.ts';
import { mayRunOffice, useSession } from '../frame/session-context.ts';

export function HomesPage() {
  const mayAdd = mayRunOffice(useSession());
  const homes = useQuery(homesQuery());
  const [search, setSearch] = useSearchParams();
  const find = search.get('find') ?? '';
  return (
    <DeskPage>
      <div className="grid grid-cols-[minmax(0,1fr)_auto] items-end gap-3 pb-5 wide:grid-cols-[auto_minmax(0,1fr)_auto] wide:gap-x-8">
        <PageHeading className="wide:pb-2 wide:text-[2.75rem] wide:leading-none">Homes</PageHeading>
        <search className="order-last col-span-full wide:order-none wide:col-span-1">
          <Cells>
            <TextField
              label="Find by name, address, phone or serial"
              name="find"
              type="search"
              autoComplete="off"
              value={find}
              onChange={(event) => {
                const typed = event.target.value;
                setSearch(typed === '' ? {} : { find: typed }, { replace: true });
              }}
            />
          </Cells>
        </search>
        {mayAdd && (
          <KeyLink to="/homes/new" face="main" className="min-h-touch wide:min-h-key">
            Add a home
          </KeyLink>
        )}
      </div>
      {homes.isPending && <Waiting>Fetching the homes…</Waiting>}
      {homes.isError && <Failed error={homes.error} onRetry={homes.refetch} />}
      {homes.data?.length === 0 && <NoHomes mayAdd={mayAdd} />}
      {homes.data && homes.data.length > 0 && <HomeRows homes={homes.data} find={find} />}
    </DeskPage>
  );
}

function NoHomes({ mayAdd }: { mayAdd: boolean }) {
  if (!mayAdd) {
    return (
      <Empty head="No home is on your list.">
        <p>The homes that your visits lead to stand here.</p>
      </Empty>
    );
  }
  return (
    <Empty
      head="No home yet."
      keys={
        <KeyLink to="/homes/new" face="main">
          Add the first home
        </KeyLink>
      }
    >
      <p>A home belongs to a customer; its machines and every run made on them stand with it.</p>
    </Empty>
  );
}

/** Everything that a person might know of a home. */
function textsOf({ customer, address, town, machines }: HomeListItem) {
  return [
    ...[customer.name, customer.phone, customer.email, address, town],
    ...machines.flatMap(({ make, model, serial }) => [make, model, serial]),
  ];
}

function HomeRows({ homes, find }: { homes: HomeListItem[]; find: string }) {
  const found = homes.filter((home) => matchesWords(find, textsOf(home)));
  return (
    <>
      <ul className="border-t-line border-print">
        {found.map((home) => (
          <HomeRow key={home.id} home={home} />
        ))}
      </ul>
      <p role="status" className="lab pt-3.5">
        {found.length === homes.length
          ? `${homes.length} home${homes.length === 1 ? '' : 's'}`
          : `${found.length} of ${homes.length} homes`}
      </p>
    </>
  );
}

function HomeRow({ home }: { home: HomeListItem }) {
  const { customer, machines } = home;
  return (
    <li className="words grid items-baseline gap-x-8 border-b border-hair py-2 desk:grid-cols-[minmax(0,1.1fr)_minmax(0,1fr)_minmax(0,1.4fr)] desk:py-1">
      <p>
        <Link
          to={`/homes/${home.id}`}
          className="inline-flex min-h-touch items-center text-[1.125rem] leading-[1.2] font-semibold desk:min-h-10"
        >
          {[home.address, home.town].filter(Boolean).join(', ')}
        </Link>
      </p>
      <p>
        <span className="font-semibold">{customer.name}</span>
        {customer.phone && <span className="fig text-print"> · {customer.phone}</span>}
      </p>
      <ul>
        {machines.length === 0 && <li className="text-print">no machine yet</li>}
        {machines.map((machine) => (
          <li key={machine.id}>
            <Link
              to={`/machines/${machine.id}`}
              className="inline-flex min-h-touch items-center text-print desk:min-h-10"
            >
              {machineWords(machine)}
              {machine.serial && `, ${machine.serial}`}
            </Link>
          </li>
        ))}
      </ul>
    </li>
  );
}
