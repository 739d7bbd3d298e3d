import { useQuery } from '@tanstack/react-query';
import { useNavigate, useParams } from 'react-router-dom';
import type { MachinePage } from '#shared/schemas/homes.ts';
import { machineQuery, useChangeMachine } from '../../api/machines.ts';
import { DeskPage } from '../../components/frame.tsx';
import { UnfetchedPage } from '../../components/waiting.tsx';
import { FormFrame, FormHead } from '../../forms/form-frame.tsx';
import { MachineCells, useMachineForm } from '../../forms/machine-form.tsx';

export function EditMachinePage() {
  const { id = '' } = useParams();
  const machine = useQuery(machineQuery(id));
  if (!machine.data) return <UnfetchedPage noun="machine" query={machine} />;
  return <EditMachineForm machine={machine.data} />;
}

function EditMachineForm({ machine }: { machine: MachinePage }) {
  const changeMachine = useChangeMachine(machine.id);
  const navigate = useNavigate();
  const { home, customer } = machine;
  const form = useMachineForm(machine, async (changed) => {
    await changeMachine.mutateAsync(changed);
    await navigate(`/machines/${machine.id}`);
  });
  return (
    <DeskPage>
      <FormHead
        form={form}
        title="Change the plate facts"
        lead={`${customer.name}, ${home.address}.`}
      />
      <FormFrame form={form} doer="Save the machine" leave={`/machines/${machine.id}`}>
        <MachineCells form={form} />
      </FormFrame>
    </DeskPage>
  );
}
