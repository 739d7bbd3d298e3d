import { useEffect, useRef, type ReactNode } from 'react';

/** A heading that takes the focus as it comes, so that what the page turned into is read out. */
export function FocusedHeading({
  className,
  children,
}: {
  className: string;
  children: ReactNode;
}) {
  const heading = useRef<HTMLHeadingElement>(null);
  useEffect(() => heading.current?.focus({ preventScroll: true }), []);
  return (
    <h1 ref={heading} tabIndex={-1} className={className}>
      {children}
    </h1>
  );
}
