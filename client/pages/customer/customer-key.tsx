import type { ReactNode } from 'react';

/** A key for a page that comes without the router, which the other keys bring along. */
export function CustomerKey({ onPress, children }: { onPress: () => void; children: ReactNode }) {
  return (
    <button
      type="button"
      onClick={onPress}
      className="inline-flex min-h-main cursor-pointer touch-manipulation items-center justify-center rounded-key border-line border-print bg-key px-6 py-1.5 font-gothic text-press font-stretch-[96%] active:border-ink active:bg-ink active:text-paper"
    >
      {children}
    </button>
  );
}
