import type { ReactNode } from 'react';

/** The instrument's panel at the thumb: keys on the deck, a 3 px bar above them. */
export function Deck({ children, className = '' }: { children: ReactNode; className?: string }) {
  return (
    <div
      className={`sticky bottom-0 z-10 flex flex-wrap gap-2 border-t-bar border-ink bg-deck px-3 pt-2.5 pb-[max(14px,env(safe-area-inset-bottom))] desk:px-12 ${className}`}
    >
      {children}
    </div>
  );
}
