import { useEffect, useRef, type ReactNode } from 'react';
import { Key } from './key.tsx';
import { WatchSign } from './signs.tsx';

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
  const slip = useRef<HTMLDialogElement>(null);
  useEffect(() => {
    const dialog = slip.current;
    dialog?.showModal();
    return () => dialog?.close();
  }, []);
  return (
    <dialog
      ref={slip}
      aria-labelledby="slip-question"
      onCancel={(event) => {
        event.preventDefault();
        onBack();
      }}
      className="mx-auto mt-auto mb-0 w-full max-w-site border-t-slip border-ink bg-deck px-4 py-5 text-ink backdrop:bg-ink/40 desk:my-auto"
    >
      <div className="grid grid-cols-[44px_minmax(0,1fr)] items-center gap-3">
        <WatchSign className="size-[42px] text-watch" />
        <h2 id="slip-question" className="font-serif text-finding leading-[1.12]">
          {question}
        </h2>
      </div>
      <div className="pt-2.5 pb-3.5 text-say">{children}</div>
      <div className="grid grid-cols-2 gap-[10px]">
        <Key face={isStop ? 'stop' : 'main'} size="site" disabled={isBusy} onClick={onDo}>
          {doer}
        </Key>
        <Key size="site" onClick={onBack}>
          Go back
        </Key>
      </div>
    </dialog>
  );
}
