import { PAGE_SHARE, type ChartMove } from './chart-keys.ts';
import { indexAtOrAfter, nearestReading, type Pyramid } from './pyramid.ts';
import type { ChartEvent } from './chart-events.ts';
import type { Span } from './strip.ts';
import { moveView, showTime, wholeView, zoomView } from './view.ts';

/** What is shown of a run, and where its readout stands. */
export type ChartState = {
  view: Span;
  /** Time of the reading that is read out, s; null before anyone asked. */
  cursorS: number | null;
};

export type ChartContext = {
  pyramid: Pyramid;
  durationS: number;
  events: ChartEvent[];
  /** Pixels across the paper: an arrow moves by one of them where readings lie denser. */
  widthPx: number;
};

export function startState(durationS: number): ChartState {
  return { view: wholeView(durationS), cursorS: null };
}

/** The state after a move. A cursor that leaves the paper takes the view along. */
export function applyMove(state: ChartState, move: ChartMove, context: ChartContext): ChartState {
  const { view } = state;
  const { durationS } = context;
  const aboutS = cursorInView(state) ?? (view.fromS + view.toS) / 2;
  switch (move.kind) {
    case 'zoom':
      return { ...state, view: zoomView(view, move.factor, aboutS, durationS) };
    case 'page':
      return {
        ...state,
        view: moveView(view, move.by * PAGE_SHARE * (view.toS - view.fromS), durationS),
      };
    case 'whole':
      return { ...state, view: wholeView(durationS) };
    case 'cursor':
      return moveCursor(state, stepFrom(state, move.by, context), context);
    case 'cursor-to':
      return moveCursor(state, move.where === 'start' ? 0 : durationS, context);
    case 'event': {
      const timeS = nextEventS(state, move.by, context.events);
      return timeS === null ? state : moveCursor(state, timeS, context);
    }
    case 'pick':
      return state;
  }
}

/** The readout on the reading nearest to a time. */
export function moveCursor(state: ChartState, timeS: number, context: ChartContext): ChartState {
  const i = nearestReading(context.pyramid, timeS);
  if (i < 0) return state;
  const cursorS = context.pyramid.timesS[i]!;
  return { cursorS, view: showTime(state.view, cursorS, context.durationS) };
}

function cursorInView({ view, cursorS }: ChartState): number | null {
  return cursorS !== null && cursorS >= view.fromS && cursorS <= view.toS ? cursorS : null;
}

/** To the next reading, or by a pixel where readings lie closer than that. */
function stepFrom(state: ChartState, by: number, context: ChartContext): number {
  const { view } = state;
  const { timesS } = context.pyramid;
  const fromS = cursorInView(state);
  if (fromS === null) return by > 0 ? view.fromS : view.toS;
  const pixelS = (view.toS - view.fromS) / context.widthPx;
  const byPixelsS = fromS + by * pixelS;
  const i = indexAtOrAfter(timesS, fromS);
  const neighbourS = timesS[Math.min(timesS.length - 1, Math.max(0, i + by))] ?? fromS;
  return by > 0 ? Math.max(byPixelsS, neighbourS) : Math.min(byPixelsS, neighbourS);
}

function nextEventS(
  { cursorS, view }: ChartState,
  by: 1 | -1,
  events: ChartEvent[],
): number | null {
  const fromS = cursorS ?? (by > 0 ? view.fromS - 1 : view.toS + 1);
  const ahead = events
    .map(({ timeS }) => timeS)
    .filter((timeS) => (by > 0 ? timeS > fromS + 0.5 : timeS < fromS - 0.5))
    .sort((a, b) => (a - b) * by);
  return ahead[0] ?? null;
}
