import { useQuery } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import { customerQuery } from '../../api/customers.ts';
import { homeQuery } from '../../api/homes.ts';
import { DeskPage } from '../../components/frame.tsx';
import { Word } from '../../components/key.tsx';
import { PageHeading } from '../../components/page-heading.tsx';
import { SectionHead } from '../../components/section-head.tsx';
import { Failed, Waiting } from '../../components/waiting.tsx';
import { CustomerPicker } from '../../forms/customer-picker.tsx';
import { machineWords } from '../../format/job-words.ts';
import { useCallAddress } from './call-address.ts';
import { CallForm } from './call-form.tsx';
import { HomePicker } from './home-picker.tsx';
import { MachinePicker } from './machine-picker.tsx';

/** A call, asked for in the order that it is told in: who, where, which machine, what is wrong, when. */
export function TakeCallPage() {
  const { chosen, choose, reopen } = useCallAddress();
  return (
    <DeskPage>
      <PageHeading>Take a call</PageHeading>
      <p className="max-w-read pt-1.5 pb-6 text-say">
        Who calls, where the machine stands, what is wrong with it, and when somebody comes.
      </p>
      <div className="grid max-w-form gap-9">
        {chosen.customer === null ? (
          <Step name="Customer">
            <CustomerPicker onPick={({ id }) => choose('customer', id)} />
          </Step>
        ) : (
          <ChosenCustomer id={chosen.customer} onChange={() => reopen('customer')} />
        )}
        {chosen.customer !== null && chosen.home === null && (
          <Step name="Home">
            <HomePicker customerId={chosen.customer} onPick={(id) => choose('home', id)} />
          </Step>
        )}
        {chosen.customer !== null && chosen.home !== null && (
          <HomeAndMachine
            homeId={chosen.home}
            machineId={chosen.machine}
            onChangeHome={() => reopen('home')}
            onChangeMachine={() => reopen('machine')}
            onPick={(id) => choose('machine', id)}
          />
        )}
      </div>
    </DeskPage>
  );
}

function Step({ name, children }: { name: string; children: ReactNode }) {
  return (
    <section>
      <SectionHead>{name}</SectionHead>
      <div className="pt-3">{children}</div>
    </section>
  );
}

type ChosenProps = { name: string; children: ReactNode; onChange: () => void };

/** A step that is done: what was chosen, and the word that opens it again. */
function Chosen({ name, children, onChange }: ChosenProps) {
  return (
    <section className="-mb-5 grid grid-cols-[minmax(0,1fr)_auto] items-center gap-4 border-b border-hair pb-2">
      <div>
        <h2 className="lab">{name}</h2>
        <p className="words pt-0.5 text-[1.25rem] leading-[1.3] font-semibold">{children}</p>
      </div>
      <Word onClick={onChange} aria-label={`Change the ${name.toLowerCase()}`}>
        Change
      </Word>
    </section>
  );
}

function ChosenCustomer({ id, onChange }: { id: string; onChange: () => void }) {
  const customer = useQuery(customerQuery(id));
  if (customer.isPending) return <Waiting>Fetching the customer…</Waiting>;
  if (customer.isError) return <Failed error={customer.error} onRetry={customer.refetch} />;
  const { name, phone } = customer.data;
  return (
    <Chosen name="Customer" onChange={onChange}>
      {name}
      {phone && <span className="fig font-medium text-print"> · {phone}</span>}
    </Chosen>
  );
}

type HomeAndMachineProps = {
  homeId: string;
  machineId: string | null;
  onChangeHome: () => void;
  onChangeMachine: () => void;
  onPick: (machineId: string) => void;
};

function HomeAndMachine({ homeId, machineId, ...on }: HomeAndMachineProps) {
  const home = useQuery(homeQuery(homeId));
  if (home.isPending) return <Waiting>Fetching the home…</Waiting>;
  if (home.isError) return <Failed error={home.error} onRetry={home.refetch} />;
  const machine = home.data.machines.find(({ id }) => id === machineId);
  return (
    <>
      <Chosen name="Home" onChange={on.onChangeHome}>
        {[home.data.address, home.data.town].filter(Boolean).join(', ')}
      </Chosen>
      {machine ? (
        <>
          <Chosen name="Machine" onChange={on.onChangeMachine}>
            {machineWords(machine)}
            {machine.serial && (
              <span className="font-medium text-print"> · serial {machine.serial}</span>
            )}
          </Chosen>
          <CallForm machine={machine} />
        </>
      ) : (
        <Step name="Machine">
          <MachinePicker home={home.data} onPick={on.onPick} />
        </Step>
      )}
    </>
  );
}
