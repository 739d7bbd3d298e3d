import { useQuery } from '@tanstack/react-query';
import { useNavigate, useParams } from 'react-router-dom';
import type { HomeListItem } from '#shared/schemas/homes.ts';
import { homeQuery, useChangeHome } from '../../api/homes.ts';
import { DeskPage } from '../../components/frame.tsx';
import { UnfetchedPage } from '../../components/waiting.tsx';
import { FormFrame, FormHead } from '../../forms/form-frame.tsx';
import { HomeCells, useHomeForm } from '../../forms/home-form.tsx';

export function EditHomePage() {
  const { id = '' } = useParams();
  const home = useQuery(homeQuery(id));
  if (!home.data) return <UnfetchedPage noun="home" query={home} />;
  return <EditHomeForm home={home.data} />;
}

function EditHomeForm({ home }: { home: HomeListItem }) {
  const changeHome = useChangeHome(home.id);
  const navigate = useNavigate();
  const form = useHomeForm(home, async (changed) => {
    await changeHome.mutateAsync(changed);
    await navigate(`/homes/${home.id}`);
  });
  return (
    <DeskPage>
      <FormHead form={form} title="Change the address" lead={`${home.customer.name}’s home.`} />
      <FormFrame form={form} doer="Save the address" leave={`/homes/${home.id}`}>
        <HomeCells form={form} />
      </FormFrame>
    </DeskPage>
  );
}
