import type { VisitPage } from '#shared/schemas/jobs.ts';

/** The sections of a visit as keys at the thumb, each with its state. */
export function VisitKeys({ visit }: { visit: VisitPage }) {
  const keys = [
    { id: 'safety', name: 'Safety', state: visit.safetyTickedAtMs === null ? 'to tick' : 'done' },
    { id: 'runs', name: 'Runs', state: runsState(visit) },
    { id: 'machine', name: 'Machine', state: visit.job.machine.make },
    { id: 'notes', name: 'Notes', state: visit.notes ? 'to read' : 'none' },
  ];
  return (
    <nav
      aria-label="Sections of the visit"
      className="sticky bottom-0 z-10 grid grid-cols-4 gap-2 border-t-bar border-ink bg-deck px-3 pt-2.5 pb-[max(14px,env(safe-area-inset-bottom))]"
    >
      {keys.map(({ id, name, state }) => (
        <a
          key={id}
          href={`#${id}`}
          className="grid min-h-[58px] min-w-0 content-center justify-items-center gap-0.5 rounded-key border-line border-print bg-key px-1 text-center no-underline active:border-ink active:bg-ink active:text-paper"
        >
          <b className="font-gothic text-[1.0625rem] leading-[1.1] font-semibold font-stretch-[94%]">
            {name}
          </b>
          <span className="w-full truncate font-gothic text-[0.875rem] leading-[1.2] font-medium">
            {state}
          </span>
        </a>
      ))}
    </nav>
  );
}

function runsState({ runs }: VisitPage): string {
  if (runs.some(({ outcome }) => outcome === 'stop')) return `${runs.length}, stop`;
  return runs.length === 0 ? 'none yet' : String(runs.length);
}
