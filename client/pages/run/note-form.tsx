import { zodResolver } from '@hookform/resolvers/zod';
import { useEffect, useMemo, useRef, useState } from 'react';
import { useForm } from 'react-hook-form';
import { z } from 'zod';
import { newNoteSchema, type NewNote } from '#shared/schemas/runs.ts';
import { fromCelsius, toCelsius, type DisplayUnit } from '#shared/units.ts';
import { formatMoment } from '#shared/wording/format.ts';
import type { PickedMoment } from '../../chart/chart-panel.tsx';
import { nearestReading, type Pyramid } from '../../chart/pyramid.ts';
import { ErrorSummary } from '../../components/error-summary.tsx';
import { Cells, TextField } from '../../components/field.tsx';
import { Key, Word } from '../../components/key.tsx';
import { Slip } from '../../components/slip.tsx';
import { Failed } from '../../components/waiting.tsx';
import { keepRunNote, keepRunNoteEdit, keepRunNoteRemoval } from '../../device/run-notes.ts';
import { problemsOf } from '../../forms/use-checked-form.ts';
import { readMoment } from '../../forms/typed-moment.ts';
import { readNumber } from '../../forms/typed-number.ts';
import type { RunHere } from './use-run.ts';

type NoteFormProps = {
  run: RunHere;
  unit: DisplayUnit;
  pyramid: Pyramid;
  writing: { noteId: string | null; moment: PickedMoment | null };
  onDone: () => void;
};

type Typed = { timeS: string; tempC: string; text: string };

/** What was typed, in the reader's unit, as the shared schema of a note. */
function noteSchemaFor(run: RunHere, unit: DisplayUnit, pyramid: Pyramid) {
  return z
    .object({ timeS: z.string(), tempC: z.string(), text: z.string() })
    .transform(({ timeS, tempC, text }): Record<keyof NewNote, unknown> => {
      const readS = readMoment(timeS) ?? NaN;
      const typedTemp = readNumber(tempC);
      const atTrace = pyramid.tempsC[nearestReading(pyramid, readS)];
      return {
        timeS: readS,
        tempC: typedTemp === null ? atTrace : toCelsius(typedTemp, unit),
        text,
      };
    })
    .pipe(
      newNoteSchema.refine((note) => note.timeS <= run.durationS, {
        path: ['timeS'],
        message: `Enter a time up to ${formatMoment(run.durationS)}`,
      }),
    );
}

function typedFrom(
  { run, unit }: NoteFormProps,
  note: { timeS: number; tempC: number; text: string } | undefined,
): Typed {
  if (!note) return { timeS: '', tempC: '', text: '' };
  const { timeS, tempC, text } = note;
  return {
    timeS: momentTyped(timeS, run),
    tempC: fromCelsius(tempC, unit).toFixed(1),
    text,
  };
}

function momentTyped(timeS: number, run: RunHere): string {
  return formatMoment(Math.min(Math.round(timeS), run.durationS));
}

/** A note at a time and temperature: picked on the chart, or typed. */
export function NoteForm(props: NoteFormProps) {
  const { run, unit, pyramid, writing, onDone } = props;
  // What the writer had before them: a change by somebody else meanwhile is found out by it.
  const [was] = useState(() => run.notes.find((note) => note.id === writing.noteId));
  const [refusal, setRefusal] = useState<Error | null>(null);
  const schema = useMemo(() => noteSchemaFor(run, unit, pyramid), [run, unit, pyramid]);
  const form = useForm<Typed, unknown, NewNote>({
    resolver: zodResolver(schema),
    defaultValues: typedFrom(props, was),
    shouldFocusError: false,
  });
  const { errors, submitCount, isSubmitting } = form.formState;
  const { setValue, setFocus } = form;
  const heading = useRef<HTMLHeadingElement>(null);

  // Read out that a form came; the chart stays in sight for picking.
  useEffect(() => heading.current?.focus({ preventScroll: true }), []);

  useEffect(() => {
    if (!writing.moment) return;
    const { timeS, tempC } = writing.moment;
    setValue('timeS', momentTyped(timeS, run), { shouldValidate: submitCount > 0 });
    setValue('tempC', fromCelsius(tempC, unit).toFixed(1), { shouldValidate: submitCount > 0 });
    setFocus('text');
    // Only a new pick fills the cells; a failed try must not undo what was typed since.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [writing.moment]);

  const handleSubmit = form.handleSubmit(async (note) => {
    const kept = was
      ? keepRunNoteEdit({ runId: run.id, noteId: was.id, was: wordsOf(was), now: note })
      : keepRunNote({ runId: run.id, ...note });
    await kept.then(onDone, setRefusal);
  });

  return (
    <form onSubmit={handleSubmit} noValidate className="max-w-form pt-2 pb-6">
      <ErrorSummary problems={problemsOf(errors, refusal?.message ?? null)} attempt={submitCount} />
      <h3
        ref={heading}
        tabIndex={-1}
        className="words pb-2 text-[1.125rem] font-semibold outline-none"
      >
        {writing.noteId === null ? 'Add a note' : 'Change the note'}
      </h3>
      <p className="pb-3 text-small">Tap the trace to pick its place, or type it.</p>
      <Cells className="desk:grid-cols-[170px_170px_minmax(0,1fr)]">
        <TextField
          label="Time, m:ss"
          inputMode="text"
          autoComplete="off"
          error={errors.timeS?.message}
          {...form.register('timeS')}
        />
        <TextField
          label={`Temperature, °${unit}`}
          inputMode="decimal"
          autoComplete="off"
          placeholder="at the trace"
          error={errors.tempC?.message}
          {...form.register('tempC')}
        />
        <TextField
          label="Note"
          autoComplete="off"
          maxLength={200}
          error={errors.text?.message}
          {...form.register('text')}
        />
      </Cells>
      <div className="flex flex-wrap items-center gap-x-5 gap-y-2 pt-3">
        <Key type="submit" face="main" disabled={isSubmitting}>
          {isSubmitting ? 'Keeping…' : 'Keep the note'}
        </Key>
        <Word onClick={onDone}>
          {writing.noteId === null ? 'Do not keep it' : 'Leave it as it was'}
        </Word>
        {was && <RemoveNote runId={run.id} note={was} onDone={onDone} />}
      </div>
    </form>
  );
}

/** As it crosses the wire. */
function wordsOf({ timeS, tempC, text }: NewNote): NewNote {
  return { timeS, tempC, text };
}

type RemoveNoteProps = { runId: string; note: NewNote & { id: string }; onDone: () => void };

function RemoveNote({ runId, note, onDone }: RemoveNoteProps) {
  const [error, setError] = useState<Error | null>(null);
  const [isAsked, setIsAsked] = useState(false);
  const remove = () => {
    setIsAsked(false);
    keepRunNoteRemoval({ runId, noteId: note.id, was: wordsOf(note) }).then(onDone, setError);
  };
  return (
    <>
      <Word className="ml-auto" onClick={() => setIsAsked(true)}>
        Remove it
      </Word>
      {error && <Failed error={error} />}
      {isAsked && (
        <Slip
          question="Remove this note?"
          doer="Remove"
          onDo={remove}
          onBack={() => setIsAsked(false)}
        >
          <p>It goes from the chart. Links already sent keep it.</p>
        </Slip>
      )}
    </>
  );
}
