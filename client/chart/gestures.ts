import type { Span } from './strip.ts';
import { moveView, zoomView } from './view.ts';

/** What a gesture needs of the plot it moves. */
export type GestureTarget = {
  view: () => Span;
  durationS: () => number;
  /** The time under a place on the screen. */
  timeAt: (clientX: number) => number;
  widthPx: () => number;
  setView: (view: Span) => void;
  /** A finger or click that did not drag. */
  tap: (clientX: number, clientY: number) => void;
  hover: (clientX: number) => void;
};

const TAP_PX = 8;
const DOUBLE_TAP_MS = 350;
const WHEEL_STEP = 1.0018;

/**
 * Pan with one finger, pinch with two, double tap for the whole run; wheel with Ctrl (or while the chart has the
 * focus) zooms, sideways wheel pans, Shift and drag pans. `touch-action: pan-y` leaves scrolling to the page.
 * Returns what takes it all off again.
 */
export function attachGestures(element: HTMLElement, target: GestureTarget): () => void {
  const fingers = createFingers(target);
  const handlers: [string, (event: never) => void, AddEventListenerOptions?][] = [
    ['pointerdown', (event: PointerEvent) => fingers.down(element, event)],
    ['pointermove', (event: PointerEvent) => fingers.move(event)],
    ['pointerup', (event: PointerEvent) => fingers.up(event)],
    ['pointercancel', (event: PointerEvent) => fingers.cancel(event)],
    ['wheel', (event: WheelEvent) => turnWheel(element, event, target), { passive: false }],
    ['dblclick', () => target.setView({ fromS: 0, toS: target.durationS() })],
  ];
  for (const [name, handler, options] of handlers) {
    element.addEventListener(name, handler as EventListener, options);
  }
  return () => {
    for (const [name, handler] of handlers) {
      element.removeEventListener(name, handler as EventListener);
    }
  };
}

function turnWheel(element: HTMLElement, event: WheelEvent, target: GestureTarget): void {
  const view = target.view();
  const durationS = target.durationS();
  if (Math.abs(event.deltaX) > Math.abs(event.deltaY)) {
    const byS = (event.deltaX / target.widthPx()) * (view.toS - view.fromS);
    moveTo(event, view, moveView(view, byS, durationS), target);
    return;
  }
  if (!event.ctrlKey && document.activeElement !== element) return;
  const strength = event.ctrlKey ? event.deltaY * 4 : event.deltaY;
  const factor = WHEEL_STEP ** Math.max(-400, Math.min(400, strength));
  moveTo(event, view, zoomView(view, factor, target.timeAt(event.clientX), durationS), target);
}

/** A wheel that would change nothing belongs to the page. */
function moveTo(event: WheelEvent, from: Span, to: Span, target: GestureTarget): void {
  if (to.fromS === from.fromS && to.toS === from.toS && !event.ctrlKey) return;
  event.preventDefault();
  target.setView(to);
}

type Finger = { x: number; y: number; startX: number; startY: number };

function createFingers(target: GestureTarget) {
  const fingers = new Map<number, Finger>();
  let lastTapMs = -Infinity;
  let hasMoved = false;

  /** Only mouse drags without Shift are left to the plot's own selection. */
  const isOurs = (event: PointerEvent) => event.pointerType !== 'mouse' || event.shiftKey;

  function down(element: HTMLElement, event: PointerEvent): void {
    if (event.pointerType === 'mouse') {
      // The plot's own handler keeps the browser from moving the focus here.
      element.focus({ preventScroll: true });
      if (event.button !== 0) return;
    }
    if (fingers.size === 0) hasMoved = false;
    const { clientX: x, clientY: y } = event;
    fingers.set(event.pointerId, { x, y, startX: x, startY: y });
    if (isOurs(event)) element.setPointerCapture(event.pointerId);
  }

  function move(event: PointerEvent): void {
    const finger = fingers.get(event.pointerId);
    if (!finger) {
      if (event.pointerType === 'mouse') target.hover(event.clientX);
      return;
    }
    const before = [...fingers.values()].map((each) => ({ ...each }));
    finger.x = event.clientX;
    finger.y = event.clientY;
    if (Math.hypot(finger.x - finger.startX, finger.y - finger.startY) > TAP_PX) hasMoved = true;
    if (!hasMoved || (event.pointerType === 'mouse' && !event.shiftKey)) return;
    follow(before, [...fingers.values()]);
  }

  /** Keeps the times that were under the fingers under them. */
  function follow(before: Finger[], after: Finger[]): void {
    const view = target.view();
    const [firstBefore, secondBefore] = before;
    const [first, second] = after;
    if (!firstBefore || !first) return;
    const sPerPx = (view.toS - view.fromS) / target.widthPx();
    if (!secondBefore || !second) {
      target.setView(moveView(view, (firstBefore.x - first.x) * sPerPx, target.durationS()));
      return;
    }
    const apart = Math.max(20, Math.abs(first.x - second.x));
    const apartBefore = Math.max(20, Math.abs(firstBefore.x - secondBefore.x));
    const middle = (first.x + second.x) / 2;
    const movedS = ((firstBefore.x + secondBefore.x) / 2 - middle) * sPerPx;
    const zoomed = zoomView(view, apartBefore / apart, target.timeAt(middle), target.durationS());
    target.setView(moveView(zoomed, movedS, target.durationS()));
  }

  function up(event: PointerEvent): void {
    const wasAlone = fingers.size === 1;
    fingers.delete(event.pointerId);
    if (!wasAlone || hasMoved) return;
    if (event.pointerType !== 'mouse' && event.timeStamp - lastTapMs < DOUBLE_TAP_MS) {
      target.setView({ fromS: 0, toS: target.durationS() });
      lastTapMs = -Infinity;
      return;
    }
    lastTapMs = event.timeStamp;
    target.tap(event.clientX, event.clientY);
  }

  function cancel(event: PointerEvent): void {
    fingers.delete(event.pointerId);
  }

  return { down, move, up, cancel };
}
