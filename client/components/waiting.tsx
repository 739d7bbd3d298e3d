import type { ReactNode } from 'react';
import { DeskPage } from './frame.tsx';
import { Key } from './key.tsx';
import { Notice } from './notice.tsx';
import { PageHeading } from './page-heading.tsx';

/** Waiting is a sentence. */
export function Waiting({ children }: { children: ReactNode }) {
  return (
    <p role="status" className="words py-6 text-[1.125rem] text-print">
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

type Fetched = { isPending: boolean; error: Error | null; refetch: () => unknown };

/** A whole desk page that waits for what it shows, or says why it cannot be shown. */
export function UnfetchedPage({ noun, query }: { noun: string; query: Fetched }) {
  return (
    <DeskPage>
      {query.error ? (
        <>
          <PageHeading>{`This ${noun} did not open`}</PageHeading>
          <Failed error={query.error} onRetry={query.refetch} />
        </>
      ) : (
        <Waiting>Fetching the {noun}…</Waiting>
      )}
    </DeskPage>
  );
}
