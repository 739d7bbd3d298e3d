import type { ReactNode } from 'react';
import { Key } from './key.tsx';
import { Notice } from './notice.tsx';

/** Waiting is a sentence. */
export function Waiting({ children }: { children: ReactNode }) {
  return (
    <p role="status" className="words py-6 text-[18px] text-print">
      {children}
    </p>
  );
}

/** What could not be fetched, in words, and a way to try it again. */
export function Failed({ error, onRetry }: { error: Error; onRetry?: () => unknown }) {
  return (
    <Notice kind="stop" role="alert" head={error.message} className="my-6 max-w-form">
      {onRetry && (
        <div className="pt-3">
          <Key onClick={() => void onRetry()}>Try again</Key>
        </div>
      )}
    </Notice>
  );
}
