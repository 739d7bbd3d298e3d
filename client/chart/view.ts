import type { Span } from './strip.ts';

/** Nothing is gained by showing less than this. */
const SHORTEST_S = 4;

/** The same span moved and cut to lie within the record. */
export function clampView({ fromS, toS }: Span, durationS: number): Span {
  const wholeS = Math.max(durationS, SHORTEST_S);
  const spanS = Math.min(Math.max(toS - fromS, SHORTEST_S), wholeS);
  const middleS = (fromS + toS) / 2;
  const startS = Math.min(Math.max(middleS - spanS / 2, 0), wholeS - spanS);
  return { fromS: startS, toS: startS + spanS };
}

/** Shorter by `factor` (below 1 shows less), with `aboutS` staying where it stands. */
export function zoomView(view: Span, factor: number, aboutS: number, durationS: number): Span {
  const wholeS = Math.max(durationS, SHORTEST_S);
  const spanS = view.toS - view.fromS;
  const newS = Math.min(Math.max(spanS * factor, SHORTEST_S), wholeS);
  const share = (aboutS - view.fromS) / spanS;
  const fromS = aboutS - share * newS;
  return clampView({ fromS, toS: fromS + newS }, durationS);
}

export function moveView(view: Span, byS: number, durationS: number): Span {
  return clampView({ fromS: view.fromS + byS, toS: view.toS + byS }, durationS);
}

/** The same length, moved only as far as needed for a time to be in it. */
export function showTime(view: Span, timeS: number, durationS: number): Span {
  if (timeS < view.fromS) return moveView(view, timeS - view.fromS, durationS);
  if (timeS > view.toS) return moveView(view, timeS - view.toS, durationS);
  return view;
}

export function wholeView(durationS: number): Span {
  return { fromS: 0, toS: Math.max(durationS, SHORTEST_S) };
}

export function isWhole(view: Span, durationS: number): boolean {
  return view.toS - view.fromS >= Math.max(durationS, SHORTEST_S) * 0.9999;
}
