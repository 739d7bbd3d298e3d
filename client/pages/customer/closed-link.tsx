import type { ShopToReach } from '../../api/shared-run.ts';
import { ThemeWord } from '../../components/theme-word.tsx';
import { CustomerHeading } from './customer-heading.tsx';
import { Phone } from './reach-shop.tsx';

/** A mistyped link, one that is out of date and one that was taken back look the same. */
export function ClosedLink({ shop, message }: { shop: ShopToReach; message: string }) {
  return (
    <main id="main" className="mx-auto max-w-letter px-5 pt-3 pb-10">
      <div className="flex min-h-14 items-center justify-between border-b-bar border-ink">
        <p className="font-gothic text-[1.25rem] font-semibold font-stretch-[108%]">{shop.name}</p>
        <ThemeWord />
      </div>
      <div className="pt-6">
        <CustomerHeading shop={shop.name}>This link does not open</CustomerHeading>
      </div>
      <p className="max-w-read pt-3 text-lead">{message}</p>
      <p className="max-w-read pt-3 text-lead">
        Ask us for a new one: call <Phone number={shop.phone} />
        {shop.email && (
          <>
            {' '}
            or write to{' '}
            <a
              href={`mailto:${shop.email}`}
              className="relative -my-[15px] inline-block py-[15px] break-all"
            >
              {shop.email}
            </a>
          </>
        )}
        .
      </p>
    </main>
  );
}
