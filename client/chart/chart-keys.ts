/** What a key does to the chart. */
export type ChartMove =
  | { kind: 'cursor'; by: number }
  | { kind: 'cursor-to'; where: 'start' | 'end' }
  | { kind: 'event'; by: 1 | -1 }
  | { kind: 'zoom'; factor: number }
  | { kind: 'page'; by: 1 | -1 }
  | { kind: 'whole' }
  | { kind: 'pick' };

type KeyPress = {
  key: string;
  shiftKey: boolean;
  ctrlKey: boolean;
  altKey: boolean;
  metaKey: boolean;
};

/** Halves or doubles what is shown. */
export const ZOOM_IN = 0.5;
export const ZOOM_OUT = 2;
/** A page turns by most of what is shown, so that an edge stays in sight. */
export const PAGE_SHARE = 0.8;
const FINE_PX = 1;
const COARSE_PX = 10;

export const KEY_HELP =
  'Left and right arrows move along the readings, with Shift by more. N and P go to the next and previous event. Plus and minus zoom, Page Up and Page Down move, Home and End go to the ends, Escape shows the whole run.';

/** The move that a key stands for; null where the key is not the chart's. */
export function moveOfKey({ key, shiftKey, ctrlKey, altKey, metaKey }: KeyPress): ChartMove | null {
  if (ctrlKey || altKey || metaKey) return null;
  const step = shiftKey ? COARSE_PX : FINE_PX;
  switch (key) {
    case 'ArrowLeft':
      return { kind: 'cursor', by: -step };
    case 'ArrowRight':
      return { kind: 'cursor', by: step };
    case 'Home':
      return { kind: 'cursor-to', where: 'start' };
    case 'End':
      return { kind: 'cursor-to', where: 'end' };
    case 'n':
    case 'N':
      return { kind: 'event', by: 1 };
    case 'p':
    case 'P':
      return { kind: 'event', by: -1 };
    case '+':
    case '=':
      return { kind: 'zoom', factor: ZOOM_IN };
    case '-':
    case '_':
      return { kind: 'zoom', factor: ZOOM_OUT };
    case 'PageUp':
      return { kind: 'page', by: -1 };
    case 'PageDown':
      return { kind: 'page', by: 1 };
    case 'Escape':
      return { kind: 'whole' };
    case 'Enter':
      return { kind: 'pick' };
    default:
      return null;
  }
}
