import { useQuery } from '@tanstack/react-query';
import { useNavigate, useSearchParams } from 'react-router-dom';
import type { Customer } from '#shared/schemas/homes.ts';
import { customerQuery } from '../../api/customers.ts';
import { useAddHome } from '../../api/homes.ts';
import { DeskPage } from '../../components/frame.tsx';
import { PageHeading } from '../../components/page-heading.tsx';
import { SectionHead } from '../../components/section-head.tsx';
import { UnfetchedPage } from '../../components/waiting.tsx';
import { CustomerPicker } from '../../forms/customer-picker.tsx';
import { FormFrame, FormHead } from '../../forms/form-frame.tsx';
import { HomeCells, useHomeForm } from '../../forms/home-form.tsx';

/** First whose home it is, which then stands in the address; then the home. */
export function NewHomePage() {
  const [search, setSearch] = useSearchParams();
  const customerId = search.get('customer');
  if (customerId !== null) return <HomeOf customerId={customerId} />;
  return (
    <DeskPage>
      <PageHeading>New home</PageHeading>
      <p className="max-w-read pt-1.5 pb-5 text-say">A home belongs to a customer.</p>
      <SectionHead>Customer</SectionHead>
      <div className="pt-3">
        <CustomerPicker onPick={({ id }) => setSearch({ customer: id })} />
      </div>
    </DeskPage>
  );
}

function HomeOf({ customerId }: { customerId: string }) {
  const customer = useQuery(customerQuery(customerId));
  if (!customer.data) return <UnfetchedPage noun="customer" query={customer} />;
  return <NewHomeForm customer={customer.data} />;
}

function NewHomeForm({ customer }: { customer: Customer }) {
  const addHome = useAddHome();
  const navigate = useNavigate();
  const form = useHomeForm({ customerId: customer.id }, async (home) => {
    const { id } = await addHome.mutateAsync(home);
    await navigate(`/homes/${id}`);
  });
  return (
    <DeskPage>
      <FormHead form={form} title="New home" lead={`For ${customer.name}.`} />
      <FormFrame form={form} doer="Add the home" leave="/homes">
        <HomeCells form={form} />
      </FormFrame>
    </DeskPage>
  );
}
