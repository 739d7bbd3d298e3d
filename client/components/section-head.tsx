import type { ReactNode } from 'react';

type SectionHeadProps = {
  children: ReactNode;
  /** What stands at the right: the state of the section, or what can be done to it. */
  state?: ReactNode;
  id?: string;
  site?: boolean;
};

/** A 3 px bar, the name at the left, the state at the right. */
export function SectionHead({ children, state, id, site = false }: SectionHeadProps) {
  return (
    <div className="flex flex-wrap items-baseline justify-between gap-x-4 border-t-bar border-ink pt-[9px] pb-1">
      <h2 id={id} className={`font-gothic ${site ? 'text-section-site' : 'text-section'}`}>
        {children}
      </h2>
      {state && <span className="lab">{state}</span>}
    </div>
  );
}
