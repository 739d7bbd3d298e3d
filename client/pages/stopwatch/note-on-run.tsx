import { useState, type SubmitEvent } from 'react';
import type { RunToJudge } from '#shared/recorder/series-of-run.ts';
import type { DisplayUnit } from '#shared/units.ts';
import { formatMoment, formatTemp } from '#shared/wording/format.ts';
import { nearestReading } from '../../chart/pyramid.ts';
import { TextField } from '../../components/field.tsx';
import { Key } from '../../components/key.tsx';
import type { KeptThing } from '../../device/device-db.ts';
import { keepRunNote, NOTES_ALONE } from '../../device/run-notes.ts';
import { thingsOfRun } from '../../device/kept-runs.ts';
import { thisDevice } from '../../device/this-device.ts';
import { useOnDevice } from '../../device/use-on-device.ts';
import { readMoment } from '../../forms/typed-moment.ts';

type NoteOnRunProps = { runId: string; toJudge: RunToJudge; unit: DisplayUnit };

/** Notes at a moment of the run that was just taken; each lies on the phone first and goes behind the run. */
export function NoteOnRun({ runId, toJudge, unit }: NoteOnRunProps) {
  const written = useOnDevice(findNotes, runId) ?? [];
  const [problem, setProblem] = useState<string | null>(null);
  const { timesS, tempsC } = toJudge.series;
  const lastS = timesS.at(-1) ?? 0;

  function handleSubmit(event: SubmitEvent<HTMLFormElement>): void {
    event.preventDefault();
    const form = event.currentTarget;
    const typed = new FormData(form);
    const text = String(typed.get('note') ?? '').trim();
    const timeS = readMoment(String(typed.get('at') ?? ''));
    if (text === '') return setProblem('Enter the note');
    if (timeS === null || timeS > lastS) {
      return setProblem(`Enter a time up to ${formatMoment(lastS)}`);
    }
    keepRunNote({ runId, timeS, tempC: tempsC[nearestReading({ timesS }, timeS)] ?? 0, text }).then(
      () => {
        setProblem(null);
        form.reset();
      },
      (error: Error) => setProblem(error.message),
    );
  }

  return (
    <section aria-labelledby="notes-here" className="border-t border-print py-3">
      <h2 id="notes-here" className="font-serif text-finding">
        Notes
      </h2>
      <div role="status">
        <ul>
          {written.map(({ id, timeS, tempC, text, isUnsent }) => (
            <li key={id} className="border-b border-hair py-2 text-body">
              {text}{' '}
              <span className="fig whitespace-nowrap text-print">
                {formatMoment(timeS)}, {formatTemp(tempC, unit)}
              </span>
              {isUnsent && <span className="block text-small text-print">Not sent yet</span>}
            </li>
          ))}
        </ul>
      </div>
      <form onSubmit={handleSubmit} noValidate className="grid gap-2.5 pt-2">
        <TextField label="Note" name="note" maxLength={200} autoComplete="off" />
        <TextField
          label="Time of the run, m:ss"
          name="at"
          autoComplete="off"
          defaultValue={formatMoment(Math.floor(lastS))}
        />
        {problem && (
          <p role="alert" className="sw-problem">
            {problem}
          </p>
        )}
        <Key type="submit" size="site">
          Keep the note
        </Key>
      </form>
    </section>
  );
}

type NoteHere = { id: string; timeS: number; tempC: number; text: string; isUnsent: boolean };

/** Notes of the run that lie on this phone, as they were written: behind the run, or in chains of their own. */
async function findNotes(runId: string): Promise<NoteHere[]> {
  const person = thisDevice.person();
  if (!person) return [];
  const [ofRun, alone] = await Promise.all([
    thingsOfRun(runId),
    thisDevice.things.listChains(person.id, NOTES_ALONE),
  ]);
  return [...ofRun, ...alone]
    .sort((a, b) => a.order - b.order)
    .flatMap((thing) => noteOf(thing, runId));
}

function noteOf({ id, kind, payload, state }: KeptThing, runId: string): NoteHere[] {
  if (kind !== 'run-note' || !isNote(payload) || payload.runId !== runId) return [];
  const { timeS, tempC, text } = payload;
  return [{ id, timeS, tempC, text, isUnsent: state === 'unsent' }];
}

type Written = { runId: string; timeS: number; tempC: number; text: string };

/** By hand: written by this application. */
function isNote(payload: unknown): payload is Written {
  return (
    typeof payload === 'object' &&
    payload !== null &&
    'runId' in payload &&
    'timeS' in payload &&
    'tempC' in payload &&
    'text' in payload
  );
}
