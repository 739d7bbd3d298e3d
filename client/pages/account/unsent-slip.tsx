import { useState } from 'react';
import { Key } from '../../components/key.tsx';
import { SlipFrame } from '../../components/slip-frame.tsx';
import { sendNow, thisDevice, useSending, useUnsent } from '../../device/this-device.ts';
import { useSession } from '../frame/session-context.ts';
import { saveThings } from '../unsent/save-things.ts';
import { OUTCOME_WORDS } from '../unsent/unsent-words.ts';

type UnsentSlipProps = { onLeave: () => void; onBack: () => void };

/** Stands between a person with unsent things and the sign-out: send them, or take a copy, before going. */
export function UnsentSlip({ onLeave, onBack }: UnsentSlipProps) {
  const { person } = useSession();
  const { unsent, conflict, refused } = useUnsent();
  const { isSending, outcome } = useSending();
  const [isSaved, setIsSaved] = useState(false);
  const count = unsent + conflict + refused;
  const save = async () => {
    const states = ['unsent', 'conflict', 'refused'] as const;
    const lists = states.map((state) => thisDevice.things.list(person.id, state));
    await saveThings(thisDevice, person, (await Promise.all(lists)).flat());
    setIsSaved(true);
  };
  return (
    <SlipFrame
      head={count === 0 ? 'Everything is with the shop now.' : countWords(count)}
      onBack={onBack}
    >
      <div role="status" className="pt-2.5 pb-3.5 text-say">
        {count > 0 && sentence(isSaved, isSending ? null : outcome)}
      </div>
      <div className="grid grid-cols-2 gap-[10px]">
        {count > 0 && unsent > 0 && (
          <Key face="main" size="site" disabled={isSending} onClick={() => void sendNow()}>
            {isSending ? 'Sending…' : 'Send now'}
          </Key>
        )}
        {count > 0 && (
          <Key size="site" onClick={() => void save()}>
            Save to a file
          </Key>
        )}
        {(count === 0 || isSaved) && (
          <Key face={count === 0 ? 'main' : 'plain'} size="site" onClick={onLeave}>
            Sign out
          </Key>
        )}
        <Key size="site" onClick={onBack}>
          Go back
        </Key>
      </div>
    </SlipFrame>
  );
}

function countWords(count: number): string {
  return count === 1 ? '1 thing is on this phone only.' : `${count} things are on this phone only.`;
}

function sentence(isSaved: boolean, outcome: ReturnType<typeof useSending>['outcome']): string {
  if (isSaved) {
    return 'They are in the file, and stay here until you sign in on this phone again and they are sent.';
  }
  if (outcome && outcome !== 'sent') return OUTCOME_WORDS[outcome];
  return 'Send them before you sign out, or save them to a file.';
}
