import { useRef, type MouseEvent, type PointerEvent } from 'react';

/** After a finger was lifted on the key, its click is the same press once more. */
const SAME_PRESS_MS = 700;

/**
 * Handlers of a key that stamps the moment the finger went down, and counts once it is lifted on the key: sliding off
 * takes the press back (WCAG 2.2, 2.5.2). A keyboard or a screen reader presses by a click alone.
 *
 * @param onPress told the moment of the page's monotonic clock, ms
 */
export function usePress(onPress: (downMonoMs: number) => void) {
  const down = useRef<{ pointerId: number; atMs: number } | null>(null);
  const liftedAtMs = useRef(-Infinity);
  return {
    onPointerDown(event: PointerEvent<HTMLButtonElement>) {
      if (event.button !== 0) return;
      down.current = { pointerId: event.pointerId, atMs: event.timeStamp };
    },
    onPointerUp(event: PointerEvent<HTMLButtonElement>) {
      const pressed = down.current;
      down.current = null;
      if (pressed?.pointerId !== event.pointerId) return;
      liftedAtMs.current = event.timeStamp;
      if (isOn(event.currentTarget, event)) onPress(pressed.atMs);
    },
    onPointerCancel() {
      down.current = null;
    },
    onClick(event: MouseEvent<HTMLButtonElement>) {
      if (event.timeStamp - liftedAtMs.current < SAME_PRESS_MS) return;
      onPress(event.timeStamp);
    },
  };
}

function isOn(key: HTMLElement, { clientX, clientY }: PointerEvent): boolean {
  const { left, right, top, bottom } = key.getBoundingClientRect();
  return clientX >= left && clientX <= right && clientY >= top && clientY <= bottom;
}
