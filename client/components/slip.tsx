import type { ReactNode } from 'react';
import { Key } from './key.tsx';
import { SlipFrame } from './slip-frame.tsx';

type SlipProps = {
  question: string;
  /** What follows, in one sentence. */
  children: ReactNode;
  doer: string;
  isStop?: boolean;
  isBusy?: boolean;
  onDo: () => void;
  onBack: () => void;
};

/** A question that rises from the deck under a 6 px bar: the doer at the left, "Go back" at the right. */
export function Slip({
  question,
  children,
  doer,
  isStop = false,
  isBusy = false,
  onDo,
  onBack,
}: SlipProps) {
  return (
    <SlipFrame head={question} onBack={onBack}>
      <div className="pt-2.5 pb-3.5 text-say">{children}</div>
      <div className="grid grid-cols-2 gap-[10px]">
        <Key face={isStop ? 'stop' : 'main'} size="site" disabled={isBusy} onClick={onDo}>
          {doer}
        </Key>
        <Key size="site" onClick={onBack}>
          Go back
        </Key>
      </div>
    </SlipFrame>
  );
}
