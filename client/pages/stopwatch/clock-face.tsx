import { beatAt, type Rhythm } from '#shared/recorder/rhythm.ts';
import { formatElapsed } from './format-elapsed.ts';

type ClockFaceProps = { timeS: number; rhythm: Rhythm };

/** Elapsed time in huge figures, and under it the ruler that fills up to the next reading. */
export function ClockFace({ timeS, rhythm }: ClockFaceProps) {
  const elapsed = formatElapsed(timeS);
  return (
    <section className="sw-clock" aria-label="Clock">
      <p
        role="timer"
        aria-label="Elapsed"
        className={`sw-elapsed fig ${elapsed.length > 5 ? 'sw-elapsed-long' : ''}`}
      >
        {elapsed}
      </p>
      {rhythm !== null && <Beat timeS={timeS} rhythm={rhythm} />}
    </section>
  );
}

const RULER_TO_PX = 357;
const STEPS_PER_BEAT = 40;

function Beat({ timeS, rhythm }: { timeS: number; rhythm: NonNullable<Rhythm> }) {
  const { toNextS } = beatAt(rhythm, timeS);
  const passed = Math.floor(((rhythm - toNextS) / rhythm) * STEPS_PER_BEAT);
  return (
    <div className="sw-beat">
      <svg viewBox="0 0 358 21" preserveAspectRatio="none" aria-hidden="true">
        <path d={ruler(passed + 1, STEPS_PER_BEAT)} stroke="var(--grid-major)" strokeWidth="2" />
        <path d={ruler(0, passed)} stroke="var(--ink)" strokeWidth="2" />
      </svg>
      <p className="lab leading-none whitespace-nowrap">
        read in{' '}
        <b className="fig inline-block min-w-[1ch] font-semibold text-ink">{Math.ceil(toNextS)}</b>{' '}
        s
      </p>
    </div>
  );
}

/** A tick a step, a longer one each fourth, the longest where a reading is due. */
function ruler(from: number, to: number): string {
  let path = '';
  for (let i = from; i <= to; i++) {
    const x = 1 + (i / STEPS_PER_BEAT) * (RULER_TO_PX - 1);
    const height = i === STEPS_PER_BEAT ? 18 : i % 4 === 0 ? 12 : 6;
    path += `M${x.toFixed(1)} 20v-${height}`;
  }
  return path;
}
