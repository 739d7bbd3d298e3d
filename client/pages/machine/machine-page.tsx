import { useQuery } from '@tanstack/react-query';
import { useParams } from 'react-router-dom';
import type { MachinePage as Machine } from '#shared/schemas/homes.ts';
import { machineQuery } from '../../api/machines.ts';
import { Crumb } from '../../components/crumb.tsx';
import { Fact, Facts } from '../../components/facts.tsx';
import { DeskPage } from '../../components/frame.tsx';
import { KeyLink, WordLink } from '../../components/key-link.tsx';
import { PageHeading } from '../../components/page-heading.tsx';
import { UnfetchedPage } from '../../components/waiting.tsx';
import { machineWords } from '../../format/job-words.ts';
import { mayRunOffice, useSession } from '../frame/session-context.ts';
import { FittedParts } from './fitted-parts.tsx';
import { MachineRuns } from './machine-runs.tsx';
import { SpecifiedRatings } from './specified-ratings.tsx';

export function MachinePage() {
  const { id = '' } = useParams();
  const machine = useQuery(machineQuery(id));
  if (!machine.data) return <UnfetchedPage noun="machine" query={machine} />;
  return <MachineSheet machine={machine.data} />;
}

function MachineSheet({ machine }: { machine: Machine }) {
  const { home, customer } = machine;
  const mayTakeCall = mayRunOffice(useSession());
  const callTo = `/jobs/new?customer=${customer.id}&home=${home.id}&machine=${machine.id}`;
  return (
    <DeskPage>
      <div className="grid items-end gap-x-14 gap-y-4 wide:grid-cols-[minmax(0,1fr)_auto]">
        <div>
          <Crumb to={`/homes/${home.id}`}>
            {customer.name}, {home.address}
          </Crumb>
          <PageHeading>{machineWords(machine)}</PageHeading>
        </div>
        <PlateFacts machine={machine} />
      </div>
      <div className="flex flex-wrap items-center gap-x-6 gap-y-2 pt-4 pb-8">
        {mayTakeCall && <KeyLink to={callTo}>Take a call about it</KeyLink>}
        <WordLink to={`/machines/${machine.id}/edit`}>Change the plate facts</WordLink>
      </div>
      <div className="grid gap-11">
        <MachineRuns machine={machine} />
        <SpecifiedRatings machine={machine} />
        <FittedParts machine={machine} />
      </div>
    </DeskPage>
  );
}

function PlateFacts({ machine }: { machine: Machine }) {
  const rated = [
    machine.ratedVolts !== null && `${machine.ratedVolts}\u00a0V`,
    machine.ratedWatts !== null && `${machine.ratedWatts}\u00a0W`,
  ].filter(Boolean);
  return (
    <Facts>
      <Fact name="Serial">{machine.serial || 'not known'}</Fact>
      <Fact name="Where it stands">{machine.place || 'not written down'}</Fact>
      <Fact name="Heat controlled by">{machine.control}</Fact>
      <Fact name="Rated">{rated.join(', ') || 'not written down'}</Fact>
    </Facts>
  );
}
