import { useState } from 'react';
import { shopChangeSchema, type Shop } from '#shared/schemas/people.ts';
import { useChangeShop } from '../../api/shop.ts';
import { Cells, PickField, SelectField, TextField } from '../../components/field.tsx';
import { Key } from '../../components/key.tsx';
import { Notice } from '../../components/notice.tsx';
import { FormHead } from '../../forms/form-frame.tsx';
import { useCheckedForm } from '../../forms/use-checked-form.ts';

/** Asked of the browser: it is the one that has to show times in the zone. */
const ZONES = Intl.supportedValuesOf('timeZone');
const UNITS = [
  { value: 'F', words: '°F' },
  { value: 'C', words: '°C' },
];

export function ShopForm({ shop }: { shop: Shop }) {
  const changeShop = useChangeShop();
  const [isSaved, setIsSaved] = useState(false);
  const form = useCheckedForm({
    schema: shopChangeSchema,
    defaultValues: shop,
    save: async (changed) => {
      setIsSaved(false);
      await changeShop.mutateAsync(changed);
      setIsSaved(true);
    },
  });
  const { register, fault } = form;
  const zones = ZONES.includes(shop.zone) ? ZONES : [shop.zone, ...ZONES];
  return (
    <>
      <FormHead
        form={form}
        title="Shop"
        lead="The name and address on papers, and how figures are shown."
      />
      <form onSubmit={form.handleSubmit} noValidate className="max-w-form">
        <Cells className="grid-cols-2">
          <TextField
            label="Name"
            {...register('name')}
            error={fault('name')}
            className="col-span-2 desk:col-span-1"
          />
          <TextField
            label="Town"
            {...register('town')}
            error={fault('town')}
            className="col-span-2 desk:col-span-1"
          />
          <TextField
            label="Phone"
            type="tel"
            {...register('phone')}
            error={fault('phone')}
            className="col-span-2 desk:col-span-1"
          />
          <TextField
            label="E-mail"
            type="email"
            {...register('email')}
            error={fault('email')}
            className="col-span-2 desk:col-span-1"
          />
          <SelectField
            label="Time zone"
            {...register('zone')}
            error={fault('zone')}
            className="col-span-2 desk:col-span-1"
          >
            {zones.map((zone) => (
              <option key={zone}>{zone}</option>
            ))}
          </SelectField>
          <PickField
            label="Temperatures in"
            options={UNITS}
            {...register('unit')}
            error={fault('unit')}
            className="col-span-2 desk:col-span-1"
          />
          <TextField
            label="Complete cycles that a proof run needs"
            inputMode="numeric"
            {...register('minCycles', { valueAsNumber: true })}
            error={fault('minCycles')}
            className="col-span-2"
          />
        </Cells>
        <div className="pt-[22px]">
          <Key type="submit" face="main" disabled={form.isSaving} className="w-full desk:w-auto">
            {form.isSaving ? 'Saving…' : 'Save the shop'}
          </Key>
        </div>
        {isSaved && <Notice kind="done" role="status" head="The shop is saved." className="mt-5" />}
      </form>
    </>
  );
}
