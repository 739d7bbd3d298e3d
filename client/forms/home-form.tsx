import { newHomeSchema, type Home, type NewHome } from '#shared/schemas/homes.ts';
import { Cells, TextAreaField, TextField } from '../components/field.tsx';
import { useCheckedForm } from './use-checked-form.ts';

export function useHomeForm(
  home: Pick<Home, 'customerId'> & Partial<Home>,
  save: (home: NewHome) => Promise<unknown>,
) {
  const { customerId, address = '', town = '', accessNotes = '' } = home;
  const defaultValues = { customerId, address, town, accessNotes };
  return useCheckedForm({ schema: newHomeSchema, defaultValues, save });
}

export function HomeCells({ form }: { form: ReturnType<typeof useHomeForm> }) {
  const { register, fault } = form;
  return (
    <Cells className="desk:grid-cols-[2fr_1fr]">
      <TextField
        label="Address"
        {...register('address')}
        error={fault('address')}
        autoComplete="off"
      />
      <TextField label="Town" {...register('town')} error={fault('town')} autoComplete="off" />
      <TextAreaField
        label="Access: keys, dogs, where to park, where the machine stands"
        {...register('accessNotes')}
        error={fault('accessNotes')}
        className="desk:col-span-2"
      />
    </Cells>
  );
}
