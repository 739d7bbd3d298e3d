import { useEffect, useRef } from 'react';

export type KeyboardKeys = {
  figure: (figure: string, downMonoMs: number) => void;
  byLetter: Record<string, (downMonoMs: number) => void>;
};

/** A keyboard's keys as the pad's, while nothing else on the page takes letters. */
export function useKeyboard(isOn: boolean, keys: KeyboardKeys): void {
  const latest = useRef(keys);
  useEffect(() => {
    latest.current = keys;
  });
  useEffect(() => {
    if (!isOn) return;
    const handleKey = (event: KeyboardEvent) => {
      if (event.repeat || event.ctrlKey || event.metaKey || event.altKey || isTaken(event)) return;
      const { figure, byLetter } = latest.current;
      if (/^[0-9]$/.test(event.key)) return figure(event.key, event.timeStamp);
      const press = byLetter[event.key.toLowerCase()];
      if (!press) return;
      event.preventDefault();
      press(event.timeStamp);
    };
    window.addEventListener('keydown', handleKey);
    return () => window.removeEventListener('keydown', handleKey);
  }, [isOn]);
}

/** Somebody writes in a field, or a slip is open. */
function isTaken({ target }: KeyboardEvent): boolean {
  if (document.querySelector('dialog[open]')) return true;
  return target instanceof HTMLElement && target.closest('input, textarea, select') !== null;
}
