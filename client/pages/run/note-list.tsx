import { useState } from 'react';
import type { Note, RunPage } from '#shared/schemas/runs.ts';
import type { DisplayUnit } from '#shared/units.ts';
import { formatMoment, formatTemp } from '#shared/wording/format.ts';
import { useRemoveNote } from '../../api/runs.ts';
import { Word } from '../../components/key.tsx';
import { Slip } from '../../components/slip.tsx';
import { Failed } from '../../components/waiting.tsx';

type LetteredNote = Note & { letter: string };

type NoteListProps = {
  run: RunPage;
  notes: LetteredNote[];
  unit: DisplayUnit;
  onChange: (noteId: string) => void;
};

/** Every note whole, in order of time, under the letter it has on the chart. */
export function NoteList({ run, notes, unit, onChange }: NoteListProps) {
  const remove = useRemoveNote(run.id);
  const [leaving, setLeaving] = useState<LetteredNote | null>(null);
  if (notes.length === 0) return null;
  return (
    <div className="pb-2">
      <h2 className="sr-only">Notes</h2>
      <ul className="border-t border-print">
        {notes.map((note) => (
          <li
            key={note.id}
            className="grid grid-cols-[26px_minmax(0,1fr)] items-baseline gap-x-2 border-b border-hair py-1 desk:grid-cols-[26px_minmax(0,1fr)_auto]"
          >
            <b className="font-gothic text-[16px]">{note.letter}</b>
            <p className="py-1.5 text-[16px] leading-[1.35]">
              {note.text}{' '}
              <span className="fig whitespace-nowrap text-print">
                {formatMoment(note.timeS)}, {formatTemp(note.tempC, unit)}
              </span>
            </p>
            {run.mayWrite && (
              <span className="col-start-2 -ml-1 flex gap-4 desk:col-start-3">
                <Word onClick={() => onChange(note.id)} aria-label={`Change note ${note.letter}`}>
                  Change
                </Word>
                <Word onClick={() => setLeaving(note)} aria-label={`Remove note ${note.letter}`}>
                  Remove
                </Word>
              </span>
            )}
          </li>
        ))}
      </ul>
      {remove.isError && <Failed error={remove.error} />}
      {leaving && (
        <Slip
          question={`Remove note ${leaving.letter}?`}
          doer="Remove"
          isBusy={remove.isPending}
          onDo={() => remove.mutate(leaving.id, { onSettled: () => setLeaving(null) })}
          onBack={() => setLeaving(null)}
        >
          <p>“{leaving.text}” goes from the chart. Links already sent keep it.</p>
        </Slip>
      )}
    </div>
  );
}
