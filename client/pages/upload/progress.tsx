type ProgressProps = {
  /** What is going on, in a sentence. */
  children: string;
  /** 0 to 1. */
  share: number;
  /** Beside the bar: "3.1 of 33 MB". */
  figure: string;
};

/** A ruled bar that fills with ink, under a sentence. */
export function Progress({ children, share, figure }: ProgressProps) {
  const percent = Math.round(Math.min(Math.max(share, 0), 1) * 100);
  return (
    <div className="py-6">
      <div className="flex flex-wrap items-baseline justify-between gap-x-4 pb-2">
        <p role="status" className="words text-[1.125rem] font-medium">
          {children}
        </p>
        <p className="fig text-table text-print">{figure}</p>
      </div>
      <div
        role="progressbar"
        aria-label={children}
        aria-valuenow={percent}
        aria-valuemin={0}
        aria-valuemax={100}
        className="h-4 border border-print bg-strip"
      >
        <div className="h-full bg-ink" style={{ width: `${percent}%` }} />
      </div>
    </div>
  );
}
