import type { ReactNode } from 'react';
import { usePress } from './press.ts';
import type { Wheel } from '#shared/recorder/keypad.ts';

type CounterProps = {
  wheels: Wheel[];
  /** Two short lines: printed, then what to do. */
  printed: ReactNode;
  /** In ink after the printed words. */
  figure: string;
  todo: ReactNode;
  onMark: (downMonoMs: number) => void;
};

/** The counter wheels above the keys: figures typed in ink, a guess in print. */
export function Counter({ wheels, printed, figure, todo, onMark }: CounterProps) {
  const press = usePress(onMark);
  return (
    <div className="sw-counter">
      <div className="sw-wheels fig" aria-hidden="true">
        {wheels.map(({ figure, look }, i) => (
          <span key={i} className={`sw-wheel-${look}`}>
            {figure}
          </span>
        ))}
      </div>
      <p className="lab">
        {printed} {figure && <b className="fig">{figure}</b>}
        <br />
        <b>{todo}</b>
      </p>
      <button type="button" className="word min-w-12 justify-center" {...press}>
        Mark
      </button>
    </div>
  );
}
