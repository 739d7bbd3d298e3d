import { useState } from 'react';
import { Key } from '../../components/key.tsx';
import { Notice } from '../../components/notice.tsx';
import { SectionHead } from '../../components/section-head.tsx';
import { WordLink } from '../../components/key-link.tsx';
import type { KeptThing } from '../../device/device-db.ts';
import { keepThing, thisDevice } from '../../device/this-device.ts';
import { timeWords } from '../../format/when.ts';
import { kindWords } from './unsent-words.ts';

type ConflictProps = { thing: KeptThing; zone: string };

/** Two people wrote in the same place: both texts, and the choice. */
export function Conflict({ thing, zone }: ConflictProps) {
  const [error, setError] = useState<Error | null>(null);
  const clash = notesClash(thing);
  const drop = async () => {
    await thisDevice.things.drop([thing.id]);
    await thisDevice.changed();
  };
  const settle = (work: () => Promise<unknown>) => {
    work().then(drop).catch(setError);
  };
  if (!clash) return null;
  const { visitId, mine, theirs } = clash;
  const resend = () =>
    keepThing('visit-edit', { visitId, basedOn: theirs.notesVersion, notes: mine });
  return (
    <section>
      <SectionHead state="changed in both places">{kindWords(thing.kind)}</SectionHead>
      <dl className="grid gap-4 py-3">
        <Text name={`The shop has${writtenBy(theirs.notesEdited, zone)}`} text={theirs.notes} />
        <Text name={`On this phone, ${timeWords(thing.madeAtMs, zone)}`} text={mine} />
      </dl>
      {error && <Notice kind="stop" role="alert" head={error.message} className="mb-3" />}
      <div className="flex flex-wrap gap-2">
        <Key size="site" onClick={() => settle(resend)}>
          Send mine
        </Key>
        <Key size="site" onClick={() => settle(() => Promise.resolve())}>
          Leave the shop’s
        </Key>
      </div>
      <WordLink to={`/visits/${visitId}`}>Open the visit</WordLink>
    </section>
  );
}

function Text({ name, text }: { name: string; text: string }) {
  return (
    <div>
      <dt className="lab">{name}</dt>
      <dd className="text-body whitespace-pre-line">{text || 'Nothing'}</dd>
    </div>
  );
}

type Theirs = {
  notes: string;
  notesVersion: string;
  notesEdited: { by: string; atMs: number } | null;
};

function writtenBy(edited: Theirs['notesEdited'], zone: string): string {
  return edited ? `, ${edited.by}, ${timeWords(edited.atMs, zone)}` : '';
}

/** By hand: written by this application on either side of the wire. */
function notesClash({ answer, payload }: KeptThing) {
  if (answer?.status !== 'conflict' || !isEdit(payload) || !isTheirs(answer.server)) return null;
  return { visitId: payload.visitId, mine: payload.notes, theirs: answer.server };
}

function isEdit(payload: unknown): payload is { visitId: string; notes: string } {
  return (
    typeof payload === 'object' && payload !== null && 'visitId' in payload && 'notes' in payload
  );
}

function isTheirs(server: unknown): server is Theirs {
  return (
    typeof server === 'object' && server !== null && 'notes' in server && 'notesVersion' in server
  );
}
