import type { ReactNode } from 'react';

const LINES_PX = { minor: 14, major: 70 };

/** The printed paper with no trace on it: what an empty list looks like. Ornament; the words stand under it. */
export function PrintedPaper({ children }: { children?: ReactNode }) {
  return (
    <div
      aria-hidden="true"
      className="-mx-4 h-40 overflow-hidden border-y border-print bg-strip desk:-mx-12 desk:h-[220px]"
    >
      <svg className="size-full" fill="none">
        <defs>
          <Grid id="paper-minor" sizePx={LINES_PX.minor} className="stroke-grid-minor" />
          <Grid id="paper-major" sizePx={LINES_PX.major} className="stroke-grid-major" />
        </defs>
        <rect className="fill-band-opens" y="28%" width="100%" height="14%" />
        <rect className="fill-band-closes" y="58%" width="100%" height="14%" />
        <rect width="100%" height="100%" fill="url(#paper-minor)" />
        <rect width="100%" height="100%" fill="url(#paper-major)" />
        {['28%', '42%', '58%', '72%'].map((y) => (
          <line key={y} className="stroke-band-edge" x2="100%" y1={y} y2={y} />
        ))}
        {children}
      </svg>
    </div>
  );
}

function Grid({ id, sizePx, className }: { id: string; sizePx: number; className: string }) {
  return (
    <pattern id={id} width={sizePx} height={sizePx} patternUnits="userSpaceOnUse">
      <path className={className} d={`M.5 0V${sizePx}M0 .5H${sizePx}`} />
    </pattern>
  );
}

type EmptyProps = { head: string; children: ReactNode; keys?: ReactNode };

/** What is not there yet, why, and what to do about it. */
export function Empty({ head, children, keys }: EmptyProps) {
  return (
    <section>
      <PrintedPaper />
      <h2 className="pt-6 font-serif text-[1.75rem] leading-[1.12] font-semibold tracking-[-0.012em] desk:pt-[34px] desk:text-[2rem]">
        {head}
      </h2>
      <div className="max-w-[58ch] pt-2.5 pb-[22px] text-say">{children}</div>
      {keys && <div className="flex flex-wrap items-center gap-3.5">{keys}</div>}
    </section>
  );
}
