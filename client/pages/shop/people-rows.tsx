import { useState } from 'react';
import type { Person } from '#shared/schemas/people.ts';
import { useDisablePerson, useEnablePerson } from '../../api/people.ts';
import { Word } from '../../components/key.tsx';
import { Slip } from '../../components/slip.tsx';
import { Failed } from '../../components/waiting.tsx';

type PeopleRowsProps = { people: Person[]; ownId: string };

export function PeopleRows({ people, ownId }: PeopleRowsProps) {
  const disable = useDisablePerson();
  const enable = useEnablePerson();
  const [asked, setAsked] = useState<Person | null>(null);
  const error = disable.error ?? enable.error;
  return (
    <>
      {error && <Failed error={error} />}
      <ul>
        {people.map((person) => (
          <PersonRow
            key={person.id}
            person={person}
            isOwn={person.id === ownId}
            onDisable={() => setAsked(person)}
            onEnable={() => enable.mutate(person.id)}
          />
        ))}
      </ul>
      {asked && (
        <Slip
          question={`Disable ${asked.name}?`}
          doer="Disable"
          isStop
          isBusy={disable.isPending}
          onDo={() => disable.mutate(asked.id, { onSettled: () => setAsked(null) })}
          onBack={() => setAsked(null)}
        >
          They are signed out everywhere at once and cannot sign in. What they recorded stays. You
          can enable them again.
        </Slip>
      )}
    </>
  );
}

type PersonRowProps = {
  person: Person;
  isOwn: boolean;
  onDisable: () => void;
  onEnable: () => void;
};

function PersonRow({ person, isOwn, onDisable, onEnable }: PersonRowProps) {
  const isDisabled = person.disabledAtMs !== null;
  return (
    <li className="words grid min-h-touch grid-cols-[minmax(0,1fr)_auto] items-center gap-x-6 border-b border-hair py-1 desk:grid-cols-[minmax(0,1fr)_minmax(0,1.2fr)_120px_120px]">
      <p className={`text-[1.125rem] font-semibold ${isDisabled ? 'text-print line-through' : ''}`}>
        {person.name}
      </p>
      <p className="break-all max-desk:col-start-1">{person.email}</p>
      <p className="text-print max-desk:col-start-1">{isDisabled ? 'disabled' : person.role}</p>
      <p className="max-desk:col-start-2 max-desk:row-start-1 desk:text-right">
        {isOwn && <span className="text-print">you</span>}
        {!isOwn && isDisabled && (
          <Word onClick={onEnable} aria-label={`Enable ${person.name}`}>
            Enable
          </Word>
        )}
        {!isOwn && !isDisabled && (
          <Word onClick={onDisable} aria-label={`Disable ${person.name}`}>
            Disable
          </Word>
        )}
      </p>
    </li>
  );
}
