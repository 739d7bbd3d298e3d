import type { ReactNode } from 'react';

/** Facts of a title block: columns parted by 1 px rules; two by two on a phone. */
export function Facts({ children }: { children: ReactNode }) {
  return (
    <dl className="grid grid-cols-2 border-t border-print desk:flex desk:flex-wrap desk:gap-y-3 desk:border-t-0">
      {children}
    </dl>
  );
}

export function Fact({ name, children }: { name: string; children: ReactNode }) {
  return (
    <div className="border-b border-hair py-2 pr-2 desk:border-b-0 desk:border-l desk:border-print desk:py-0.5 desk:pr-6 desk:pl-4">
      <dt className="lab">{name}</dt>
      <dd className="words pt-[3px] text-[1rem] leading-[1.3] font-medium">{children}</dd>
    </div>
  );
}
