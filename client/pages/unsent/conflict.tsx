import { WordLink } from '../../components/key-link.tsx';
import type { KeptThing } from '../../device/device-db.ts';
import { keepThing } from '../../device/this-device.ts';
import { timeWords } from '../../format/when.ts';
import { ChooseOne } from './choose-one.tsx';

type ConflictProps = { thing: KeptThing; zone: string };

/** Notes of a visit that somebody else wrote meanwhile. */
export function Conflict({ thing, zone }: ConflictProps) {
  const clash = notesClash(thing);
  if (!clash) return null;
  const { visitId, mine, theirs } = clash;
  return (
    <ChooseOne
      {...{ thing, zone }}
      theirs={{
        name: `The shop has${writtenBy(theirs.notesEdited, zone)}`,
        text: theirs.notes || 'Nothing',
      }}
      mine={mine || 'Nothing'}
      onSend={() => keepThing('visit-edit', { visitId, basedOn: theirs.notesVersion, notes: mine })}
    >
      <WordLink to={`/visits/${visitId}`}>Open the visit</WordLink>
    </ChooseOne>
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
