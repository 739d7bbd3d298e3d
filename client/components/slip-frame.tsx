import type { ReactNode } from 'react';
import { WatchSign } from './signs.tsx';
import { useModal } from './use-modal.ts';

type SlipFrameProps = { head: string; onBack: () => void; children: ReactNode };

/** Rises from the deck under a 6 px bar with the watch sign and a question; what can be done follows. */
export function SlipFrame({ head, onBack, children }: SlipFrameProps) {
  const modal = useModal();
  return (
    <dialog
      ref={modal}
      aria-labelledby="slip-head"
      onCancel={(event) => {
        event.preventDefault();
        onBack();
      }}
      className="mx-auto mt-auto mb-0 w-full max-w-site border-t-slip border-ink bg-deck px-4 py-5 text-ink backdrop:bg-ink/40 desk:my-auto"
    >
      <div className="grid grid-cols-[44px_minmax(0,1fr)] items-center gap-3">
        <WatchSign className="size-[42px] text-watch" />
        <h2 id="slip-head" className="font-serif text-finding leading-[1.12]">
          {head}
        </h2>
      </div>
      {children}
    </dialog>
  );
}
