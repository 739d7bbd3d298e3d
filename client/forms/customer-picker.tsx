import { useQuery } from '@tanstack/react-query';
import { useDeferredValue, useState } from 'react';
import type { Customer } from '#shared/schemas/homes.ts';
import { customersQuery, useAddCustomer } from '../api/customers.ts';
import { homesQuery } from '../api/homes.ts';
import { ErrorSummary } from '../components/error-summary.tsx';
import { Cells, TextField } from '../components/field.tsx';
import { Key } from '../components/key.tsx';
import { Failed, Waiting } from '../components/waiting.tsx';
import { matchesWords } from '../format/matches-words.ts';
import { ChoiceList } from './choice-list.tsx';
import { CustomerCells, useCustomerForm } from './customer-form.tsx';
import { FormFrame } from './form-frame.tsx';

const MOST_SHOWN = 8;

/** Whose machine: found by name, phone or address, or added here. */
export function CustomerPicker({ onPick }: { onPick: (customer: Customer) => void }) {
  const customers = useQuery(customersQuery());
  const homes = useQuery(homesQuery());
  const [find, setFind] = useState('');
  const sought = useDeferredValue(find);
  const [isAdding, setIsAdding] = useState(false);

  if (customers.isPending || homes.isPending) return <Waiting>Fetching the customers…</Waiting>;
  if (customers.isError) return <Failed error={customers.error} onRetry={customers.refetch} />;
  if (homes.isError) return <Failed error={homes.error} onRetry={homes.refetch} />;

  if (isAdding || customers.data.length === 0) {
    const leave = customers.data.length === 0 ? '/jobs' : () => setIsAdding(false);
    return <NewCustomer name={find} onAdded={onPick} leave={leave} />;
  }
  const addressesOf = ({ id }: Customer) =>
    homes.data.filter(({ customerId }) => customerId === id).map(({ address }) => address);
  const found = customers.data.filter((customer) =>
    matchesWords(sought, [customer.name, customer.phone, ...addressesOf(customer)]),
  );
  return (
    <div className="max-w-form">
      <Cells>
        <TextField
          label="Find by name, phone or address"
          name="find-customer"
          type="search"
          autoComplete="off"
          value={find}
          onChange={(event) => setFind(event.target.value)}
        />
      </Cells>
      <p role="status" className="lab py-3">
        {found.length === 0 && 'Nobody of that name, phone or address.'}
        {found.length > MOST_SHOWN && `${found.length} found; the first ${MOST_SHOWN} are shown.`}
      </p>
      <ChoiceList
        choices={found.slice(0, MOST_SHOWN).map((customer) => ({
          id: customer.id,
          name: customer.name,
          details: [customer.phone, ...addressesOf(customer)].filter(Boolean).join(' · '),
          onPick: () => onPick(customer),
        }))}
      />
      <div className="pt-4">
        <Key onClick={() => setIsAdding(true)}>Add a customer</Key>
      </div>
    </div>
  );
}

type NewCustomerProps = {
  name: string;
  onAdded: (customer: Customer) => void;
  leave: string | (() => void);
};

function NewCustomer({ name, onAdded, leave }: NewCustomerProps) {
  const addCustomer = useAddCustomer();
  const form = useCustomerForm(
    null,
    async (customer) => onAdded(await addCustomer.mutateAsync(customer)),
    name,
  );
  return (
    <>
      <ErrorSummary problems={form.problems} attempt={form.attempt} />
      <FormFrame form={form} doer="Add the customer" leave={leave}>
        <CustomerCells form={form} />
      </FormFrame>
    </>
  );
}
