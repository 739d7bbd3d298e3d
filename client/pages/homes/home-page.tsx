import { useQuery } from '@tanstack/react-query';
import { Link, useParams } from 'react-router-dom';
import type { HomeListItem, Machine } from '#shared/schemas/homes.ts';
import { homeQuery } from '../../api/homes.ts';
import { Crumb } from '../../components/crumb.tsx';
import { DeskPage } from '../../components/frame.tsx';
import { KeyLink, WordLink } from '../../components/key-link.tsx';
import { PageHeading } from '../../components/page-heading.tsx';
import { SectionHead } from '../../components/section-head.tsx';
import { UnfetchedPage } from '../../components/waiting.tsx';
import { machineWords } from '../../format/job-words.ts';
import { mayRunOffice, useSession } from '../frame/session-context.ts';

export function HomePage() {
  const { id = '' } = useParams();
  const home = useQuery(homeQuery(id));
  if (!home.data) return <UnfetchedPage noun="home" query={home} />;
  return <HomeSheet home={home.data} />;
}

function HomeSheet({ home }: { home: HomeListItem }) {
  const mayChange = mayRunOffice(useSession());
  const { customer } = home;
  return (
    <DeskPage>
      <Crumb to="/homes">Homes</Crumb>
      <PageHeading>{[home.address, home.town].filter(Boolean).join(', ')}</PageHeading>
      {home.accessNotes && (
        <p className="max-w-read pt-2 text-say whitespace-pre-line">{home.accessNotes}</p>
      )}
      {mayChange && <WordLink to={`/homes/${home.id}/edit`}>Change the address</WordLink>}
      <div className="grid items-start gap-x-16 gap-y-9 pt-6 wide:grid-cols-[minmax(0,1fr)_380px]">
        <section>
          <SectionHead state={countWords(home.machines.length)}>Machines</SectionHead>
          <ul>
            {home.machines.map((machine) => (
              <MachineRow key={machine.id} machine={machine} />
            ))}
          </ul>
          {home.machines.length === 0 && (
            <p className="py-3 text-say">No machine stands here yet.</p>
          )}
          <div className="pt-5">
            <KeyLink
              to={`/homes/${home.id}/machines/new`}
              face={home.machines.length === 0 ? 'main' : 'plain'}
            >
              Add a machine
            </KeyLink>
          </div>
        </section>
        <section>
          <SectionHead>Customer</SectionHead>
          <CustomerFacts home={home} />
          {mayChange && (
            <p className="flex flex-wrap gap-x-6">
              <WordLink to={`/customers/${customer.id}/edit?home=${home.id}`}>
                Change the customer
              </WordLink>
              <WordLink to={`/jobs?find=${encodeURIComponent(customer.name)}&state=all`}>
                Their jobs
              </WordLink>
            </p>
          )}
        </section>
      </div>
    </DeskPage>
  );
}

function countWords(count: number) {
  return count === 0 ? 'none yet' : `${count}`;
}

function MachineRow({ machine }: { machine: Machine }) {
  const details = [machine.serial && `serial ${machine.serial}`, machine.place].filter(Boolean);
  return (
    <li className="words flex flex-wrap items-baseline gap-x-4 border-b border-hair py-1">
      <Link
        to={`/machines/${machine.id}`}
        className="inline-flex min-h-touch items-center text-[1.125rem] font-semibold"
      >
        {machineWords(machine)}
      </Link>
      <span className="text-print">{details.join(' · ')}</span>
    </li>
  );
}

function CustomerFacts({ home: { customer } }: { home: HomeListItem }) {
  return (
    <div className="pt-2 pb-1">
      <p className="words text-[1.25rem] font-semibold">{customer.name}</p>
      {customer.phone && (
        <p>
          <a
            href={`tel:${customer.phone.replaceAll(/[^+\d]/g, '')}`}
            className="fig inline-flex min-h-touch items-center text-[1.125rem]"
          >
            {customer.phone}
          </a>
        </p>
      )}
      {customer.email && (
        <p>
          <a
            href={`mailto:${customer.email}`}
            className="words inline-flex min-h-touch items-center break-all text-[1.0625rem]"
          >
            {customer.email}
          </a>
        </p>
      )}
      {customer.notes && <p className="pt-1 whitespace-pre-line">{customer.notes}</p>}
    </div>
  );
}
