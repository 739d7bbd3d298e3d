import { useState } from 'react';
import type { HomeListItem } from '#shared/schemas/homes.ts';
import { useAddMachine } from '../../api/machines.ts';
import { ErrorSummary } from '../../components/error-summary.tsx';
import { Key } from '../../components/key.tsx';
import { ChoiceList } from '../../forms/choice-list.tsx';
import { FormFrame } from '../../forms/form-frame.tsx';
import { MachineCells, useMachineForm } from '../../forms/machine-form.tsx';
import { machineWords } from '../../format/job-words.ts';

type MachinePickerProps = { home: HomeListItem; onPick: (machineId: string) => void };

/** Which machine: one that stands in the home, or a new one. */
export function MachinePicker({ home, onPick }: MachinePickerProps) {
  const [isAdding, setIsAdding] = useState(false);
  if (isAdding || home.machines.length === 0) {
    const leave = home.machines.length === 0 ? '/jobs' : () => setIsAdding(false);
    return <NewMachineForm homeId={home.id} onAdded={onPick} leave={leave} />;
  }
  return (
    <>
      <ChoiceList
        choices={home.machines.map((machine) => ({
          id: machine.id,
          name: machineWords(machine),
          details: [machine.serial && `serial ${machine.serial}`, machine.place]
            .filter(Boolean)
            .join(' · '),
          onPick: () => onPick(machine.id),
        }))}
      />
      <div className="pt-4">
        <Key onClick={() => setIsAdding(true)}>Add a machine</Key>
      </div>
    </>
  );
}

type NewMachineFormProps = {
  homeId: string;
  onAdded: (machineId: string) => void;
  leave: string | (() => void);
};

function NewMachineForm({ homeId, onAdded, leave }: NewMachineFormProps) {
  const addMachine = useAddMachine();
  const form = useMachineForm({ homeId }, async (machine) =>
    onAdded((await addMachine.mutateAsync(machine)).id),
  );
  return (
    <>
      <ErrorSummary problems={form.problems} attempt={form.attempt} />
      <FormFrame form={form} doer="Add the machine" leave={leave}>
        <MachineCells form={form} />
      </FormFrame>
    </>
  );
}
