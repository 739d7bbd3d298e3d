import { useEffect } from 'react';

/** The one h1 of the page; it names the window too. */
export function CustomerHeading({ children, shop }: { children: string; shop: string }) {
  useEffect(() => {
    document.title = `${children} – ${shop}`;
  }, [children, shop]);
  return (
    <h1 className="pt-2 font-serif text-page desk:text-page-desk print:text-[27px]">{children}</h1>
  );
}
