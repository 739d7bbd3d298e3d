import { useQuery } from '@tanstack/react-query';
import { useLocation } from 'react-router-dom';
import { shopToReach, sharedRunQuery } from '../../api/shared-run.ts';
import { Failed, Waiting } from '../../components/waiting.tsx';
import { ClosedLink } from './closed-link.tsx';
import { CustomerSheet } from './customer-sheet.tsx';

/** What the customer sees behind a link. The link's token stands after the #, which no server is ever sent. */
export function CustomerPage() {
  const token = useLocation().hash.slice(1);
  // A page without a token asks too: the answer says how to reach the shop.
  const shared = useQuery(sharedRunQuery(token === '' ? 'none' : token));

  if (shared.isPending) {
    return (
      <main className="mx-auto max-w-letter px-5">
        <Waiting>Opening…</Waiting>
      </main>
    );
  }
  if (shared.isError) {
    const shop = shopToReach(shared.error);
    if (shop) return <ClosedLink shop={shop} message={shared.error.message} />;
    return (
      <main className="mx-auto max-w-letter px-5">
        <h1 className="pt-6 font-serif text-page">The page did not open</h1>
        <Failed error={shared.error} onRetry={shared.refetch} />
      </main>
    );
  }
  return <CustomerSheet shared={shared.data} />;
}
