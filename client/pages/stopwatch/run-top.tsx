import type { HandRun } from '#shared/recorder/replay-run.ts';
import { useSending, useUnsent } from '../../device/this-device.ts';
import { ThemeWord } from '../../components/theme-word.tsx';

type RunTopProps = {
  run: HandRun;
  machine: string;
  visitId: string;
  onRun: () => void;
  onFinish: () => void;
};

/** Above the paper: the way back, what is taken, and the words that open its slips. */
export function RunTop({ run, machine, visitId, onRun, onFinish }: RunTopProps) {
  const { unsent } = useUnsent();
  const { outcome } = useSending();
  const count = run.readings.length;
  const readings = count === 1 ? '1 reading' : `${count} readings`;
  return (
    <header className="sw-top">
      <a className="sw-back" href={`/visits/${visitId}`}>
        Visit
      </a>
      <button type="button" className="sw-what" onClick={onRun}>
        <b>
          {machine}, {run.start.label.toLowerCase()}
        </b>
        <span>
          {readings}, {unsentWords(unsent, outcome === 'signed-out')}
          <i className="sr-only">. Readings, corrections and settings</i>
        </span>
      </button>
      <ThemeWord />
      <button type="button" className="word" onClick={onFinish}>
        Finish
      </button>
    </header>
  );
}

function unsentWords(unsent: number, isSignedOut: boolean): string {
  if (unsent === 0) return 'all sent';
  return isSignedOut ? `${unsent} to send after signing in` : `${unsent} to send`;
}
