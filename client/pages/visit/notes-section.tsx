import { useState } from 'react';
import { Word } from '../../components/key.tsx';
import { WordLink } from '../../components/key-link.tsx';
import { SectionHead } from '../../components/section-head.tsx';
import { timeWords } from '../../format/when.ts';
import { NotesForm } from './notes-form.tsx';
import type { VisitHere } from './use-visit.ts';

type NotesSectionProps = { visit: VisitHere; zone: string };

/** What was written for and on the visit; whoever records on it may write. */
export function NotesSection({ visit, zone }: NotesSectionProps) {
  const [isEditing, setIsEditing] = useState(false);
  const { notes, job, mayRecord, unsent } = visit;
  const access = job.home.accessNotes;
  return (
    <section aria-labelledby="notes">
      <SectionHead site id="notes" state={unsent.notes ? 'not sent yet' : editedWords(visit, zone)}>
        Notes
      </SectionHead>
      {isEditing ? (
        <NotesForm visit={visit} onDone={() => setIsEditing(false)} />
      ) : (
        <p className="pt-2 text-body whitespace-pre-line">
          {notes || 'Nobody wrote a note for this visit.'}
        </p>
      )}
      {mayRecord && !isEditing && (
        <Word onClick={() => setIsEditing(true)}>
          {notes ? 'Change the notes' : 'Write a note'}
        </Word>
      )}
      {access && (
        <p className="pt-2 text-body whitespace-pre-line">
          <span className="lab block">Getting in</span>
          {access}
        </p>
      )}
      <WordLink to={`/jobs/${job.id}`} className="mt-1">
        Job {job.number}
      </WordLink>
    </section>
  );
}

function editedWords({ notesEdited }: VisitHere, zone: string): string | undefined {
  return notesEdited ? `${notesEdited.by}, ${timeWords(notesEdited.atMs, zone)}` : undefined;
}
