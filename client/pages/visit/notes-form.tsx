import { useState, type SubmitEvent } from 'react';
import { visitEditSchema } from '#shared/schemas/sendings.ts';
import { Cells, TextAreaField } from '../../components/field.tsx';
import { Key } from '../../components/key.tsx';
import { keepThing } from '../../device/this-device.ts';
import type { VisitHere } from './use-visit.ts';

type NotesFormProps = { visit: VisitHere; onDone: () => void };

/** The notes, kept on the device first and sent from there. */
export function NotesForm({ visit, onDone }: NotesFormProps) {
  // What the writer had before them: a change by somebody else meanwhile is found out by it.
  const [basedOn] = useState(visit.notesVersion);
  const [error, setError] = useState<string | undefined>(undefined);

  function handleSubmit(event: SubmitEvent<HTMLFormElement>) {
    event.preventDefault();
    const typed = new FormData(event.currentTarget).get('notes');
    const parsed = visitEditSchema.shape.notes.safeParse(typed);
    if (!parsed.success) return setError(parsed.error.issues[0]?.message);
    const edit = { visitId: visit.id, basedOn, notes: parsed.data };
    keepThing('visit-edit', edit).then(onDone, (fault: Error) => setError(fault.message));
  }

  return (
    <form onSubmit={handleSubmit} noValidate className="grid gap-3 pt-3">
      <Cells>
        <TextAreaField
          label="Notes of this visit"
          name="notes"
          rows={6}
          defaultValue={visit.notes}
          error={error}
        />
      </Cells>
      <div className="grid grid-cols-2 gap-[10px]">
        <Key type="submit" face="main" size="site">
          Keep
        </Key>
        <Key size="site" onClick={onDone}>
          Go back
        </Key>
      </div>
    </form>
  );
}
