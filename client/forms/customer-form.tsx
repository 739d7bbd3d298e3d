import { newCustomerSchema, type Customer, type NewCustomer } from '#shared/schemas/homes.ts';
import { Cells, TextAreaField, TextField } from '../components/field.tsx';
import { useCheckedForm } from './use-checked-form.ts';

const BLANK: NewCustomer = { name: '', phone: '', email: '', notes: '' };

export function useCustomerForm(
  customer: Customer | null,
  save: (customer: NewCustomer) => Promise<unknown>,
  name = '',
) {
  const defaultValues = customer ?? { ...BLANK, name };
  return useCheckedForm({ schema: newCustomerSchema, defaultValues, save });
}

export function CustomerCells({ form }: { form: ReturnType<typeof useCustomerForm> }) {
  const { register, fault } = form;
  return (
    <Cells className="desk:grid-cols-2">
      <TextField
        label="Name"
        {...register('name')}
        error={fault('name')}
        className="desk:col-span-2"
        autoComplete="off"
      />
      <TextField
        label="Phone"
        type="tel"
        {...register('phone')}
        error={fault('phone')}
        autoComplete="off"
      />
      <TextField
        label="E-mail"
        type="email"
        {...register('email')}
        error={fault('email')}
        autoComplete="off"
      />
      <TextAreaField
        label="Notes, for the shop only"
        {...register('notes')}
        error={fault('notes')}
        className="desk:col-span-2"
      />
    </Cells>
  );
}
