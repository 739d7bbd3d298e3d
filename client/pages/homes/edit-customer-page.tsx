import { useQuery } from '@tanstack/react-query';
import { useNavigate, useParams, useSearchParams } from 'react-router-dom';
import type { Customer } from '#shared/schemas/homes.ts';
import { customerQuery, useChangeCustomer } from '../../api/customers.ts';
import { DeskPage } from '../../components/frame.tsx';
import { UnfetchedPage } from '../../components/waiting.tsx';
import { CustomerCells, useCustomerForm } from '../../forms/customer-form.tsx';
import { FormFrame, FormHead } from '../../forms/form-frame.tsx';

export function EditCustomerPage() {
  const { id = '' } = useParams();
  const customer = useQuery(customerQuery(id));
  if (!customer.data) return <UnfetchedPage noun="customer" query={customer} />;
  return <EditCustomerForm customer={customer.data} />;
}

function EditCustomerForm({ customer }: { customer: Customer }) {
  const changeCustomer = useChangeCustomer(customer.id);
  const navigate = useNavigate();
  const [search] = useSearchParams();
  const home = search.get('home');
  const back = home === null ? '/homes' : `/homes/${home}`;
  const form = useCustomerForm(customer, async (changed) => {
    await changeCustomer.mutateAsync(changed);
    await navigate(back);
  });
  return (
    <DeskPage>
      <FormHead form={form} title="Change the customer" />
      <FormFrame form={form} doer="Save the customer" leave={back}>
        <CustomerCells form={form} />
      </FormFrame>
    </DeskPage>
  );
}
