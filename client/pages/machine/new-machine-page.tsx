import { useQuery } from '@tanstack/react-query';
import { useNavigate, useParams } from 'react-router-dom';
import type { HomeListItem } from '#shared/schemas/homes.ts';
import { homeQuery } from '../../api/homes.ts';
import { useAddMachine } from '../../api/machines.ts';
import { Crumb } from '../../components/crumb.tsx';
import { DeskPage } from '../../components/frame.tsx';
import { UnfetchedPage } from '../../components/waiting.tsx';
import { FormFrame, FormHead } from '../../forms/form-frame.tsx';
import { MachineCells, useMachineForm } from '../../forms/machine-form.tsx';

export function NewMachinePage() {
  const { id = '' } = useParams();
  const home = useQuery(homeQuery(id));
  if (!home.data) return <UnfetchedPage noun="home" query={home} />;
  return <NewMachineForm home={home.data} />;
}

function NewMachineForm({ home }: { home: HomeListItem }) {
  const addMachine = useAddMachine();
  const navigate = useNavigate();
  const form = useMachineForm({ homeId: home.id }, async (machine) => {
    const { id } = await addMachine.mutateAsync(machine);
    await navigate(`/machines/${id}`);
  });
  return (
    <DeskPage>
      <FormHead
        form={form}
        title="New machine"
        above={<Crumb to={`/homes/${home.id}`}>{home.address}</Crumb>}
        lead="As its plate says. The thermostat it should have is set next."
      />
      <FormFrame form={form} doer="Add the machine" leave={`/homes/${home.id}`}>
        <MachineCells form={form} />
      </FormFrame>
    </DeskPage>
  );
}
