import { useEffect, useRef, type RefObject } from 'react';

/**
 * A dialog that is open, over all else, for as long as it stands.
 *
 * @param focus selector of what has the focus first, where it is not the first key
 */
export function useModal(focus?: string): RefObject<HTMLDialogElement | null> {
  const modal = useRef<HTMLDialogElement>(null);
  useEffect(() => {
    const dialog = modal.current;
    dialog?.showModal();
    if (focus) dialog?.querySelector<HTMLElement>(focus)?.focus();
    return () => dialog?.close();
  }, [focus]);
  return modal;
}
