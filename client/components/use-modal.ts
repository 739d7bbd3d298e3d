import { useLayoutEffect, useRef, type RefObject } from 'react';

/**
 * A dialog that is open, over all else, for as long as it stands.
 *
 * @param focus selector of what has the focus first, where it is not the first key
 */
export function useModal(focus?: string): RefObject<HTMLDialogElement | null> {
  const modal = useRef<HTMLDialogElement>(null);
  // Closed while it still stands in the page: only then does the focus go back to where it came from.
  useLayoutEffect(() => {
    const dialog = modal.current;
    dialog?.showModal();
    if (focus) dialog?.querySelector<HTMLElement>(focus)?.focus();
    return () => dialog?.close();
  }, [focus]);
  return modal;
}
