import { useState, type ReactNode } from 'react';
import { Key } from '../../components/key.tsx';
import { Notice } from '../../components/notice.tsx';
import { SectionHead } from '../../components/section-head.tsx';
import type { KeptThing } from '../../device/device-db.ts';
import { thisDevice } from '../../device/this-device.ts';
import { timeWords } from '../../format/when.ts';
import { kindWords } from './unsent-words.ts';

type ChooseOneProps = {
  thing: KeptThing;
  zone: string;
  theirs: { name: string; text: string };
  /** What this phone wanted. */
  mine: string;
  /** Keeps it once more, made on what the shop has now. */
  onSend: () => Promise<unknown>;
  send?: string;
  /** Where both can be seen whole. */
  children: ReactNode;
};

/** Two people wrote in the same place: both texts, and the choice. Whatever is chosen settles the thing. */
export function ChooseOne(props: ChooseOneProps) {
  const { thing, zone, theirs, mine, onSend, send = 'Send mine', children } = props;
  const [error, setError] = useState<Error | null>(null);
  const drop = async () => {
    await thisDevice.things.drop([thing.id]);
    await thisDevice.changed();
  };
  return (
    <section>
      <SectionHead state="changed in both places">{kindWords(thing.kind)}</SectionHead>
      <dl className="grid gap-4 py-3">
        <Side name={theirs.name} text={theirs.text} />
        <Side name={`On this phone, ${timeWords(thing.madeAtMs, zone)}`} text={mine} />
      </dl>
      {error && <Notice kind="stop" role="alert" head={error.message} className="mb-3" />}
      <div className="flex flex-wrap gap-2">
        <Key size="site" onClick={() => void onSend().then(drop).catch(setError)}>
          {send}
        </Key>
        <Key size="site" onClick={() => void drop().catch(setError)}>
          Leave the shop’s
        </Key>
      </div>
      {children}
    </section>
  );
}

function Side({ name, text }: { name: string; text: string }) {
  return (
    <div>
      <dt className="lab">{name}</dt>
      <dd className="text-body whitespace-pre-line">{text}</dd>
    </div>
  );
}
