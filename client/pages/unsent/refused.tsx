import { useState } from 'react';
import { Word } from '../../components/key.tsx';
import { Notice } from '../../components/notice.tsx';
import { Slip } from '../../components/slip.tsx';
import type { KeptThing } from '../../device/device-db.ts';
import { sendNow, thisDevice } from '../../device/this-device.ts';
import { kindWords, textOf } from './unsent-words.ts';

/** Refusals that a later version of the server may take back. */
const MAY_PASS_LATER = ['unknown-kind', 'unreadable'];

/** The server turned it down, and why. It stays until its maker lets go of it. */
export function Refused({ thing }: { thing: KeptThing }) {
  const [isAsked, setIsAsked] = useState(false);
  const { answer } = thing;
  const [code, message] =
    answer?.status === 'refused' ? [answer.code, answer.message] : ['', 'It was turned down.'];
  const drop = async () => {
    await thisDevice.things.drop([thing.id]);
    await thisDevice.changed();
  };
  const tryAgain = async () => {
    await thisDevice.things.askAgain([thing.id]);
    await thisDevice.changed();
    await sendNow();
  };
  return (
    <Notice kind="stop" head={`${kindWords(thing.kind)}: not taken`}>
      <p>{message}</p>
      <p className="whitespace-pre-line">{textOf(thing)}</p>
      <div className="flex flex-wrap gap-x-6">
        {MAY_PASS_LATER.includes(code) && <Word onClick={() => void tryAgain()}>Try again</Word>}
        <Word onClick={() => setIsAsked(true)}>Throw it away</Word>
      </div>
      {isAsked && (
        <Slip
          question="Throw this away?"
          doer="Throw it away"
          isStop
          onDo={() => void drop()}
          onBack={() => setIsAsked(false)}
        >
          It is nowhere else, and cannot be brought back.
        </Slip>
      )}
    </Notice>
  );
}
