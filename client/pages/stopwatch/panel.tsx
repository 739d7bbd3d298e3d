import type { ReactNode } from 'react';
import { Key } from '../../components/key.tsx';
import { useModal } from '../../components/use-modal.ts';

type PanelProps = { heading: string; onClose: () => void; children: ReactNode; close?: string };

/** A slip of keys that rises from the deck; what goes on behind it goes on. */
export function Panel({ heading, onClose, children, close = 'Go back' }: PanelProps) {
  const modal = useModal();
  return (
    <dialog
      ref={modal}
      aria-labelledby="panel-heading"
      onCancel={(event) => {
        event.preventDefault();
        onClose();
      }}
      className="mx-auto mt-auto mb-0 max-h-[92dvh] w-full max-w-site overflow-y-auto border-t-slip border-ink bg-deck px-3 pt-4 pb-[max(16px,env(safe-area-inset-bottom))] text-ink backdrop:bg-ink/40 desk:my-auto"
    >
      <h2 id="panel-heading" className="px-1 pb-3 font-serif text-finding leading-[1.12]">
        {heading}
      </h2>
      {children}
      <Key size="site" className="mt-3 w-full" onClick={onClose}>
        {close}
      </Key>
    </dialog>
  );
}
