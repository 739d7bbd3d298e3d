import { Suspense, useState, type SubmitEvent } from 'react';
import type { HandReading, HandRun } from '#shared/recorder/replay-run.ts';
import { TextField } from '../../components/field.tsx';
import { Key, Word } from '../../components/key.tsx';
import { MARK_WORDS } from '../../chart/strip-of-run.ts';
import { formatAt, formatReading, formatTyped } from './format-elapsed.ts';
import { canReachProbe, ProbePart } from './lazy-live.tsx';
import { Panel } from './panel.tsx';
import type { Preferences } from './preferences.ts';
import { SettingsForm } from './settings-form.tsx';
import { otherValueOf } from '#shared/recorder/other-value.ts';

export type RunPanelProps = {
  run: HandRun;
  preferences: Preferences;
  onPrefer: (preferences: Preferences) => void;
  onCorrect: (readingId: string, temp: number) => void;
  onThrowAway: () => void;
  onClose: () => void;
};

/** What was taken so far, newest first, each open to correction; and how the stopwatch works. */
export function RunPanel(props: RunPanelProps) {
  const { run, preferences, onPrefer, onCorrect, onThrowAway, onClose } = props;
  const [isThrowing, setIsThrowing] = useState(false);
  return (
    <Panel heading="This run" onClose={onClose}>
      {canReachProbe && (
        <Suspense>
          <div className="-mt-4 px-1 pb-5">
            <ProbePart isNamed={run.start.setup.probeId !== null} />
          </div>
        </Suspense>
      )}
      <SettingsForm preferences={preferences} onPrefer={onPrefer} />
      <h3 className="px-1 pt-4 pb-1 font-gothic text-section">Readings and marks</h3>
      <TakenList run={run} onCorrect={onCorrect} />
      <div className="pt-3">
        {isThrowing ? (
          <>
            <p className="px-1 pb-2 text-say">
              The run and its {run.readings.length} readings go. This cannot be undone.
            </p>
            <Key face="stop" size="site" className="w-full" onClick={onThrowAway}>
              Throw the run away
            </Key>
          </>
        ) : (
          <Word className="px-1" onClick={() => setIsThrowing(true)}>
            Throw this run away
          </Word>
        )}
      </div>
    </Panel>
  );
}

/** A live probe's readings come by the thousand; the last ones can be corrected. */
const LIVE_SHOWN = 10;

export function TakenList({ run, onCorrect }: Pick<RunPanelProps, 'run' | 'onCorrect'>) {
  const [correcting, setCorrecting] = useState<string | null>(null);
  const live = run.readings.filter(({ from }) => from === 'probe');
  const byHand = run.readings.filter(({ from }) => from === 'hand');
  const shown = [...byHand, ...live.slice(-LIVE_SHOWN)];
  const taken = [...shown, ...run.marks].sort((a, b) => b.atS - a.atS);
  const more = live.length - LIVE_SHOWN;
  if (taken.length === 0) return <p className="px-1 py-2 text-body">Nothing yet.</p>;
  return (
    <>
      <ul className="border-t border-print">
        {taken.map((each) => (
          <li key={each.id} className="border-b border-hair px-1">
            {'kind' in each ? (
              <p className="words flex min-h-touch flex-wrap items-center gap-x-4 text-table">
                <span className="fig w-14 text-print">{formatAt(each.atS)}</span>
                {each.text ?? MARK_WORDS[each.kind]}
              </p>
            ) : correcting === each.id ? (
              <CorrectForm
                reading={each}
                unit={run.start.unit}
                onCorrect={(temp) => {
                  onCorrect(each.id, temp);
                  setCorrecting(null);
                }}
              />
            ) : (
              <p className="words flex min-h-touch flex-wrap items-center gap-x-4 text-table">
                <span className="fig w-14 text-print">{formatAt(each.atS)}</span>
                <b className="fig font-semibold">{formatReading(each, run.start.hasTenths)}</b>
                {each.from === 'probe' && <span className="text-print">probe</span>}
                {each.temp !== each.typed && (
                  <span className="text-print">
                    was {formatTyped(each.typed, run.start.hasTenths)}
                  </span>
                )}
                <Word
                  className="ml-auto"
                  aria-label={`Correct ${formatTyped(each.temp)} at ${formatAt(each.atS)}`}
                  onClick={() => setCorrecting(each.id)}
                >
                  Correct
                </Word>
              </p>
            )}
          </li>
        ))}
      </ul>
      {more > 0 && (
        <p className="px-1 pt-2 text-small text-print">
          And {more.toLocaleString('en-US')} earlier ones of the live probe.
        </p>
      )}
    </>
  );
}

type CorrectFormProps = { reading: HandReading; unit: string; onCorrect: (temp: number) => void };

function CorrectForm({ reading, unit, onCorrect }: CorrectFormProps) {
  const [fault, setFault] = useState<string>();
  function handleSubmit(event: SubmitEvent<HTMLFormElement>) {
    event.preventDefault();
    const text = String(new FormData(event.currentTarget).get('temp') ?? '').trim();
    const temp = otherValueOf(text.replace(',', '.').replace('−', '-'));
    if (temp === null) setFault('Type a number, with one decimal at most');
    else onCorrect(temp);
  }
  return (
    <form onSubmit={handleSubmit} noValidate className="grid grid-cols-[1fr_auto] gap-2 py-2">
      <TextField
        label={`Right value at ${formatAt(reading.atS)}, °${unit}`}
        name="temp"
        inputMode="decimal"
        autoComplete="off"
        defaultValue={String(reading.temp)}
        error={fault}
      />
      <Key type="submit" face="main" size="site">
        Keep both
      </Key>
    </form>
  );
}
