import type { DisplayUnit } from '#shared/units.ts';
import { formatMoment, formatTemp } from '#shared/wording/format.ts';
import { Word } from '../../components/key.tsx';
import type { NoteHere, RunHere } from './use-run.ts';

type NoteListProps = {
  run: Pick<RunHere, 'mayWrite'>;
  notes: (NoteHere & { letter: string })[];
  unit: DisplayUnit;
  onChange: (noteId: string) => void;
};

const UNSENT_WORDS = {
  written: 'Not sent yet',
  changed: 'Changed here, not sent yet',
  removed: 'Removed here, not sent yet',
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
              {note.unsent === 'removed' ? <s>{note.text}</s> : note.text}{' '}
              <span className="fig whitespace-nowrap text-print">
                {formatMoment(note.timeS)}, {formatTemp(note.tempC, unit)}
              </span>
              {note.unsent && (
                <span className="block text-small text-print">{UNSENT_WORDS[note.unsent]}</span>
              )}
            </p>
            {run.mayWrite && note.unsent !== 'removed' && (
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
