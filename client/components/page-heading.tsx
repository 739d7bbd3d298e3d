import { useEffect, useRef, type ReactNode } from 'react';
import { useLocation } from 'react-router-dom';

type PageHeadingProps = {
  children: ReactNode;
  /** For the window's title, where the heading is more than words. */
  title?: string;
  /** The form on this page has something to put right. */
  hasErrors?: boolean;
  className?: string;
};

/** The page whose heading last took the focus; the first page leaves the focus where the browser puts it. */
let headedPath: string | null = null;

/** Names the window after the page. */
export function usePageTitle(title: string, hasErrors = false) {
  useEffect(() => {
    document.title = `${hasErrors ? 'Error: ' : ''}${title} – Fusekeeper`;
  }, [title, hasErrors]);
}

/** The one h1 of a page: it names the window, and takes the focus after a step from page to page. */
export function PageHeading({
  children,
  title,
  hasErrors = false,
  className = '',
}: PageHeadingProps) {
  const heading = useRef<HTMLHeadingElement>(null);
  const { pathname } = useLocation();
  const words = title ?? (typeof children === 'string' ? children : '');
  usePageTitle(words, hasErrors);

  useEffect(() => {
    if (headedPath !== null && headedPath !== pathname) {
      heading.current?.focus({ preventScroll: true });
    }
    headedPath = pathname;
  }, [pathname]);

  return (
    <h1
      ref={heading}
      tabIndex={-1}
      className={`font-serif text-page desk:text-page-desk ${className}`}
    >
      {children}
    </h1>
  );
}
