import type { ReactNode } from 'react';
import { DoneSign, LoopArrow, NoteSign, StopSign, WatchSign } from './signs.tsx';

const KINDS = {
  note: {
    Sign: NoteSign,
    top: 'border-t-line border-ink',
    ink: 'text-ink',
    bottom: 'border-b-rule',
  },
  done: {
    Sign: DoneSign,
    top: 'border-t-line border-ink',
    ink: 'text-ink',
    bottom: 'border-b-rule',
  },
  watch: {
    Sign: WatchSign,
    top: 'border-t-line border-watch',
    ink: 'text-watch',
    bottom: 'border-b-rule',
  },
  stop: {
    Sign: StopSign,
    top: 'border-t-bar border-stop',
    ink: 'text-stop',
    bottom: 'border-b-stop',
  },
};

type NoticeProps = {
  kind?: keyof typeof KINDS;
  head?: ReactNode;
  children?: ReactNode;
  role?: 'status' | 'alert';
  className?: string;
};

/** A sign in the margin, a rule above and below; no box. */
export function Notice({ kind = 'note', head, children, role, className = '' }: NoticeProps) {
  const { Sign, top, ink, bottom } = KINDS[kind];
  return (
    <div
      role={role}
      className={`grid grid-cols-[34px_minmax(0,1fr)] gap-3 border-b py-3.5 ${top} ${bottom} ${className}`}
    >
      <span className={ink}>
        <Sign />
      </span>
      <div>
        {head && (
          <p className="font-gothic text-table leading-[1.25] font-semibold font-stretch-[96%]">
            {head}
          </p>
        )}
        {children && <div className="text-[1rem] leading-[1.42]">{children}</div>}
      </div>
    </div>
  );
}

/** A callback: the loop arrow between double rules. */
export function CallbackNotice({ head, children }: { head: ReactNode; children?: ReactNode }) {
  return (
    <aside className="grid grid-cols-[40px_minmax(0,1fr)] gap-3.5 border-y-twin border-ink [border-block-style:double] py-3.5 text-[1rem] leading-[1.35]">
      <span className="pt-1">
        <LoopArrow />
      </span>
      <div>
        <p className="font-gothic text-press font-bold font-stretch-[96%]">{head}</p>
        {children}
      </div>
    </aside>
  );
}
