import { useMemo, useState } from 'react';
import type { DisplayUnit } from '#shared/units.ts';
import { ChartPanel, type PickedMoment } from '../../chart/chart-panel.tsx';
import { letterNotes, stripOfRun } from '../../chart/strip-of-run.ts';
import { Key } from '../../components/key.tsx';
import { Failed, Waiting } from '../../components/waiting.tsx';
import { chartSentence } from './chart-sentence.ts';
import { NoteForm } from './note-form.tsx';
import { NoteList } from './note-list.tsx';
import type { NoteHere, RunHere } from './use-run.ts';
import { useRunReadings } from './use-run-readings.ts';

type Writing = { noteId: string | null; moment: PickedMoment | null };

/** The chart edge to edge, and the notes that hang on it. */
export function RunFigure({ run, unit }: { run: RunHere; unit: DisplayUnit }) {
  const readings = useRunReadings(run);
  const [writing, setWriting] = useState<Writing | null>(null);
  const notes = useMemo(() => lettered(run.notes), [run.notes]);
  const strip = useMemo(
    () =>
      stripOfRun({
        analysis: run.analysis.analysis,
        bands: run.analysis.judgedBy,
        marks: run.marks,
        notes: run.notes.filter(({ unsent }) => unsent !== 'removed'),
      }),
    [run],
  );

  if (!readings.pyramid) {
    return readings.error ? (
      <div className="px-4 desk:px-12">
        <Failed error={readings.error} onRetry={readings.retry} />
      </div>
    ) : (
      <ChartPaper />
    );
  }
  const beginNote = run.mayWrite && writing === null && (
    <Key onClick={() => setWriting({ noteId: null, moment: null })}>Add a note</Key>
  );
  return (
    <section aria-label="Chart and notes">
      <ChartPanel
        {...{ strip, unit }}
        pyramid={readings.pyramid}
        hasAllReadings={readings.hasAllReadings}
        durationS={run.durationS}
        name={chartSentence(run, unit)}
        onPick={writing ? (moment) => setWriting({ ...writing, moment }) : null}
        actions={beginNote}
      />
      <div className="px-4 desk:px-12">
        {writing && (
          <NoteForm
            key={writing.noteId ?? 'new'}
            {...{ run, unit, writing }}
            pyramid={readings.pyramid}
            onDone={() => setWriting(null)}
          />
        )}
        <NoteList
          {...{ run, notes, unit }}
          onChange={(noteId) => setWriting({ noteId, moment: null })}
        />
      </div>
    </section>
  );
}

/** The letters are those on the chart; a note that goes has none there. */
function lettered(notes: NoteHere[]): (NoteHere & { letter: string })[] {
  const [going, staying] = [true, false].map((goes) =>
    notes.filter(({ unsent }) => (unsent === 'removed') === goes),
  );
  return [
    ...letterNotes(staying ?? []),
    ...(going ?? []).map((note) => ({ ...note, letter: '' })),
  ].sort((a, b) => a.timeS - b.timeS);
}

/** The printed paper without a trace, of the chart's own height, until the readings are there. */
function ChartPaper() {
  return (
    <div className="h-[330px] border-y border-print bg-strip px-4 desk:h-[452px] desk:px-12">
      <Waiting>Fetching the readings…</Waiting>
    </div>
  );
}
