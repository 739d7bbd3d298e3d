import type { Frame } from './frame.ts';
import { nearestReading, type Pyramid } from './pyramid.ts';

/** CSS pixels from the top left of the ruled paper. */
export type Place = { left: number; top: number };

/** The dot that the readout puts on the trace. */
export function addCursorDot(over: HTMLElement): HTMLElement {
  const dot = document.createElement('div');
  dot.className = 'strip-cursor-dot';
  dot.hidden = true;
  over.append(dot);
  return dot;
}

export function moveDot(dot: HTMLElement, place: Place | null): void {
  dot.hidden = place === null;
  if (place) dot.style.transform = `translate(${place.left}px, ${place.top}px)`;
}

/** Where the reading nearest to a time stands; null where it is out of sight. */
export function placeOfReading(pyramid: Pyramid, frame: Frame, timeS: number): Place | null {
  const i = nearestReading(pyramid, timeS);
  if (i < 0 || timeS < frame.fromS || timeS > frame.toS) return null;
  const { plot, fromS, toS, lowC, highC } = frame;
  return {
    left: ((timeS - fromS) / (toS - fromS)) * plot.width,
    top: ((highC - pyramid.tempsC[i]!) / (highC - lowC)) * plot.height,
  };
}
