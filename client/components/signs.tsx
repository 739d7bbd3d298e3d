import type { ReactNode } from 'react';

type SignProps = { className?: string };

function Sign({ className = 'size-[30px]', children }: SignProps & { children: ReactNode }) {
  return (
    <svg className={`${className} shrink-0`} viewBox="0 0 30 30" fill="none" aria-hidden="true">
      {children}
    </svg>
  );
}

/** A ring with one cycle: a note, or the guard at rest. */
export function NoteSign(props: SignProps) {
  return (
    <Sign {...props}>
      <g stroke="currentColor" strokeWidth="2">
        <circle cx="15" cy="15" r="12" />
        <path d="M7.500 15C9.500 8.500 13 8.500 15 15s5.500 6.500 7.500 0" />
      </g>
    </Sign>
  );
}

/** A triangle with a rising line: watch this. */
export function WatchSign(props: SignProps) {
  return (
    <Sign {...props}>
      <path
        d="M15 3.200 28 26.400H2zM9.600 22.400l4.600 -3.400 4 -6.400"
        stroke="currentColor"
        strokeWidth="2"
      />
    </Sign>
  );
}

/** A solid octagon with a bar: stop. */
export function StopSign(props: SignProps) {
  return (
    <Sign {...props}>
      <path
        className="fill-stop"
        d="M9.600 2h10.800L28 9.600v10.800L20.400 28H9.600L2 20.400V9.600z"
      />
      <path className="stroke-strip" d="M7.500 15h15" strokeWidth="4.500" />
    </Sign>
  );
}

/** A ring with a tick: done. */
export function DoneSign(props: SignProps) {
  return (
    <Sign {...props}>
      <g stroke="currentColor" strokeWidth="2">
        <circle cx="15" cy="15" r="12" />
        <path d="M9.200 15.400l4 4 7.600 -8.600" />
      </g>
    </Sign>
  );
}

/** The arrow that loops back: a callback. */
export function LoopArrow({ className = 'w-10' }: SignProps) {
  return (
    <svg
      className={`${className} h-auto shrink-0 overflow-visible`}
      viewBox="0 0 40 30"
      fill="none"
      aria-hidden="true"
    >
      <path
        d="M2 22H28a9 9 0 0 0 0 -18H14M21 -3l-8 7 8 7"
        stroke="currentColor"
        strokeWidth={className.includes('w-6') ? 4.5 : 3}
      />
    </svg>
  );
}

/** The fuse symbol, which is also one cycle. */
export function FuseMark({ className = 'w-10' }: SignProps) {
  return (
    <svg
      className={`${className} h-auto shrink-0`}
      viewBox="0 0 40 17"
      fill="none"
      stroke="currentColor"
      strokeWidth="2"
      aria-hidden="true"
    >
      <circle cx="4" cy="8.500" r="2.600" />
      <circle cx="36" cy="8.500" r="2.600" />
      <path d="M6.600 8.500C10 -1.500 16.500 -1.500 20 8.500S30 18.500 33.400 8.500" />
    </svg>
  );
}
