import type { Note, RunPage } from '#shared/schemas/runs.ts';
import type { DisplayUnit } from '#shared/units.ts';
import { formatMoment, formatTemp } from '#shared/wording/format.ts';
import { Word } from '../../components/key.tsx';

type NoteListProps = {
  run: RunPage;
  notes: (Note & { letter: string })[];
  unit: DisplayUnit;
  onChange: (noteId: string) => void;
};

/** Every note whole, in order of time, under the letter it has on the chart. */
export function NoteList({ run, notes, unit, onChange }: NoteListProps) {
  if (notes.length === 0) return null;
  return (
    <div className="pb-2">
      <h2 className="sr-only">Notes</h2>
      <ul className="border-t border-print">
        {notes.map((note) => (
          <li
            key={note.id}
            className="grid min-h-touch grid-cols-[26px_minmax(0,1fr)_auto] items-center gap-x-2 border-b border-hair"
          >
            <b className="font-gothic text-[1rem]">{note.letter}</b>
            <p className="py-2 text-[1rem] leading-[1.35]">
              {note.text}{' '}
              <span className="fig whitespace-nowrap text-print">
                {formatMoment(note.timeS)}, {formatTemp(note.tempC, unit)}
              </span>
            </p>
            {run.mayWrite && (
              <Word onClick={() => onChange(note.id)} aria-label={`Change note ${note.letter}`}>
                Change
              </Word>
            )}
          </li>
        ))}
      </ul>
    </div>
  );
}
