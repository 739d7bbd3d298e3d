import { useQuery } from '@tanstack/react-query';
import { shopToReach, sharedRunQuery } from '../../api/shared-run.ts';
import { Notice } from '../../components/notice.tsx';
import { ClosedLink } from './closed-link.tsx';
import { CustomerHeading } from './customer-heading.tsx';
import { CustomerKey } from './customer-key.tsx';
import { CustomerSheet } from './customer-sheet.tsx';
import { useFragment } from './use-fragment.ts';

/** What the customer sees behind a link. The link's token stands after the #, which no server is ever sent. */
export function CustomerPage() {
  const token = useFragment();
  // A page without a token asks too: the answer says how to reach the shop.
  const shared = useQuery(sharedRunQuery(token === '' ? 'none' : token));

  if (shared.isPending) {
    return (
      <main className="mx-auto max-w-letter px-5">
        <p role="status" className="words py-6 text-[1.125rem] text-print">
          Opening…
        </p>
      </main>
    );
  }
  if (shared.isError) {
    const shop = shopToReach(shared.error);
    if (shop) return <ClosedLink shop={shop} message={shared.error.message} />;
    return (
      <main className="mx-auto max-w-letter px-5">
        <CustomerHeading shop="Fusekeeper">The page did not open</CustomerHeading>
        <Notice kind="stop" role="alert" head={shared.error.message} className="my-6" />
        <CustomerKey onPress={() => void shared.refetch()}>Try again</CustomerKey>
      </main>
    );
  }
  return <CustomerSheet shared={shared.data} />;
}
