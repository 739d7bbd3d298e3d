import type { ReactNode } from 'react';

type PlainPageProps = { head: string; isAlert?: boolean; children?: ReactNode };

/** A heading, what can be done, and the way back to the visit. */
export function PlainPage({ head, isAlert = false, children }: PlainPageProps) {
  const visit = window.location.pathname.split('/').slice(0, 3).join('/');
  return (
    <main id="main" className="mx-auto min-h-dvh max-w-site px-4 pt-6">
      <div role={isAlert ? 'alert' : 'status'}>
        <h1 className="pb-3 font-serif text-page">{head}</h1>
      </div>
      {children}
      <a className="word" href={visit}>
        Back to the visit
      </a>
    </main>
  );
}
