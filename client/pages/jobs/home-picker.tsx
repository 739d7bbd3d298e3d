import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { homesQuery, useAddHome } from '../../api/homes.ts';
import { ErrorSummary } from '../../components/error-summary.tsx';
import { Key } from '../../components/key.tsx';
import { Failed, Waiting } from '../../components/waiting.tsx';
import { ChoiceList } from '../../forms/choice-list.tsx';
import { FormFrame } from '../../forms/form-frame.tsx';
import { HomeCells, useHomeForm } from '../../forms/home-form.tsx';
import { machineWords } from '../../format/job-words.ts';

type HomePickerProps = { customerId: string; onPick: (homeId: string) => void };

/** Where the machine stands: one of the customer's homes, or a new one. */
export function HomePicker({ customerId, onPick }: HomePickerProps) {
  const homes = useQuery(homesQuery());
  const [isAdding, setIsAdding] = useState(false);
  if (homes.isPending) return <Waiting>Fetching the homes…</Waiting>;
  if (homes.isError) return <Failed error={homes.error} onRetry={homes.refetch} />;

  const theirs = homes.data.filter((home) => home.customerId === customerId);
  if (isAdding || theirs.length === 0) {
    const leave = theirs.length === 0 ? '/jobs' : () => setIsAdding(false);
    return <NewHomeForm customerId={customerId} onAdded={onPick} leave={leave} />;
  }
  return (
    <>
      <ChoiceList
        choices={theirs.map(({ id, address, town, machines }) => ({
          id,
          name: [address, town].filter(Boolean).join(', '),
          details: machines.map(machineWords).join(' · '),
          onPick: () => onPick(id),
        }))}
      />
      <div className="pt-4">
        <Key onClick={() => setIsAdding(true)}>Add a home</Key>
      </div>
    </>
  );
}

type NewHomeFormProps = {
  customerId: string;
  onAdded: (homeId: string) => void;
  leave: string | (() => void);
};

function NewHomeForm({ customerId, onAdded, leave }: NewHomeFormProps) {
  const addHome = useAddHome();
  const form = useHomeForm({ customerId }, async (home) =>
    onAdded((await addHome.mutateAsync(home)).id),
  );
  return (
    <>
      <ErrorSummary problems={form.problems} attempt={form.attempt} />
      <FormFrame form={form} doer="Add the home" leave={leave}>
        <HomeCells form={form} />
      </FormFrame>
    </>
  );
}
