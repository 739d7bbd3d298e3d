import {
  CONTROLS,
  FUELS,
  newMachineSchema,
  type Machine,
  type NewMachine,
} from '#shared/schemas/homes.ts';
import { Cells, PickField, TextField } from '../components/field.tsx';
import { typedNumber } from './typed-number.ts';
import { useCheckedForm } from './use-checked-form.ts';

const BLANK: Omit<NewMachine, 'homeId'> = {
  make: '',
  model: '',
  serial: '',
  fuel: 'electric',
  control: 'thermostat',
  ratedVolts: null,
  ratedWatts: null,
  place: '',
};

export function useMachineForm(
  machine: Pick<Machine, 'homeId'> & Partial<Machine>,
  save: (machine: NewMachine) => Promise<unknown>,
) {
  const defaultValues = { ...BLANK, ...machine };
  const figures = { ratedVolts: 'the volts', ratedWatts: 'the watts' };
  return useCheckedForm({ schema: newMachineSchema, defaultValues, save, figures });
}

const FUEL_OPTIONS = FUELS.map((fuel) => ({ value: fuel, words: fuel }));
const CONTROL_OPTIONS = CONTROLS.map((control) => ({ value: control, words: control }));

/** What the plate says, and where the machine stands. */
export function MachineCells({ form }: { form: ReturnType<typeof useMachineForm> }) {
  const { register, fault } = form;
  return (
    <Cells className="grid-cols-2">
      <TextField label="Make" {...register('make')} error={fault('make')} autoComplete="off" />
      <TextField label="Model" {...register('model')} error={fault('model')} autoComplete="off" />
      <TextField
        label="Serial number"
        {...register('serial')}
        error={fault('serial')}
        autoComplete="off"
        className="col-span-2 desk:col-span-1"
      />
      <TextField
        label="Where it stands"
        {...register('place')}
        error={fault('place')}
        autoComplete="off"
        className="col-span-2 desk:col-span-1"
      />
      <PickField
        label="Heat from"
        options={FUEL_OPTIONS}
        {...register('fuel')}
        error={fault('fuel')}
        className="col-span-2 desk:col-span-1"
      />
      <PickField
        label="Heat controlled by"
        options={CONTROL_OPTIONS}
        {...register('control')}
        error={fault('control')}
        className="col-span-2 desk:col-span-1"
      />
      <TextField
        label="Rated volts, V"
        inputMode="decimal"
        {...register('ratedVolts', typedNumber)}
        error={fault('ratedVolts')}
        autoComplete="off"
      />
      <TextField
        label="Rated watts, W"
        inputMode="decimal"
        {...register('ratedWatts', typedNumber)}
        error={fault('ratedWatts')}
        autoComplete="off"
      />
    </Cells>
  );
}
