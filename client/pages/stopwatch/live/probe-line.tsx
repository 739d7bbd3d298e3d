import { useEffect, useSyncExternalStore } from 'react';
import type { HandRun } from '#shared/recorder/replay-run.ts';
import { Word } from '../../../components/key.tsx';
import { liveDesk } from './live-desk.ts';
import { probeTrouble, type ProbeTrouble } from './probe-words.ts';
import './probe-line.css';

export type ProbeLineProps = {
  run: HandRun;
  nowS: number;
  /** Opens the slip where the probe's question stands. */
  onAnswer: () => void;
  /** Told when that changes, for a screen reader. */
  onSay: (words: string) => void;
};

/** On the deck, over the keys: why the live probe does not read, and one word against it. */
export function ProbeLine({ run, nowS, onAnswer, onSay }: ProbeLineProps) {
  const desk = useSyncExternalStore(liveDesk.subscribe, liveDesk.view);
  const trouble = probeTrouble(desk, run, nowS);
  const said = trouble?.said;
  useEffect(() => {
    if (said) onSay(said);
  }, [said, onSay]);

  if (!trouble) return null;
  return (
    <div className="sw-probe flex items-center gap-3 pb-1.5">
      <p className="words min-w-0 flex-1 text-[1rem] leading-[1.25] font-medium">{trouble.words}</p>
      {trouble.does && (
        <Word className="shrink-0" onClick={() => act(trouble.does, onAnswer)}>
          {trouble.does.words}
        </Word>
      )}
    </div>
  );
}

function act(does: ProbeTrouble['does'], onAnswer: () => void): void {
  if (does?.act === 'answer') onAnswer();
  if (does?.act === 'try-now') liveDesk.tryNow();
  if (does?.act === 'reconnect') void liveDesk.reconnect();
}
