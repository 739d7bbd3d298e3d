import { useId, useMemo, useState, type ReactNode } from 'react';
import type { DisplayUnit } from '#shared/units.ts';
import { formatMoment, formatTemp } from '#shared/wording/format.ts';
import { Word } from '../components/key.tsx';
import { KEY_HELP, moveOfKey, ZOOM_IN, ZOOM_OUT, type ChartMove } from './chart-keys.ts';
import { ChartLegend } from './chart-legend.tsx';
import { ChartTable } from './chart-table.tsx';
import { eventAt, eventsOf, type ChartEvent } from './chart-events.ts';
import {
  applyMove,
  moveCursor,
  startState,
  type ChartContext,
  type ChartState,
} from './chart-state.ts';
import { nearestReading, type Pyramid } from './pyramid.ts';
import { RunChart } from './run-chart.tsx';
import type { Strip } from './strip.ts';
import { useThrottled } from './use-throttled.ts';
import { clampView, isWhole } from './view.ts';

export type PickedMoment = { timeS: number; tempC: number };

type ChartPanelProps = {
  strip: Strip;
  pyramid: Pyramid;
  /** Every reading is there, not only what its columns reach. */
  hasAllReadings: boolean;
  durationS: number;
  unit: DisplayUnit;
  /** One sentence: what the chart shows. */
  name: string;
  /** Set while a place for a note is asked for. */
  onPick: ((moment: PickedMoment) => void) | null;
  /** Keys that stand under the chart at the left. */
  actions: ReactNode;
};

/** The strip chart with all that moves it, its readout and its table twin. */
export function ChartPanel(props: ChartPanelProps) {
  const { strip, pyramid, durationS, unit, name, onPick, actions } = props;
  const [state, setState] = useState<ChartState>(() => startState(durationS));
  const [widthPx, setWidthPx] = useState(600);
  const ids = { help: useId(), table: useId() };
  const events = useMemo(() => eventsOf(strip), [strip]);
  const context: ChartContext = { pyramid, durationS, events, widthPx };

  const move = (step: ChartMove) => setState((before) => applyMove(before, step, context));
  const pick = (timeS: number, tempC: number) => onPick?.({ timeS, tempC });

  function handleKey(event: KeyboardEvent) {
    const step = moveOfKey(event);
    if (!step) return;
    event.preventDefault();
    if (step.kind !== 'pick') move(step);
    else if (state.cursorS !== null) pick(state.cursorS, tempOf(pyramid, state.cursorS));
  }

  return (
    <figure aria-label={name}>
      <div className="border-y border-print bg-strip">
        <RunChart
          {...{ strip, pyramid, durationS, unit }}
          view={state.view}
          cursorS={state.cursorS}
          name={name}
          describedBy={ids.help}
          detailsId={ids.table}
          handlers={{
            onView: (view) =>
              setState((before) => ({ ...before, view: clampView(view, durationS) })),
            onCursor: (timeS) => setState((before) => moveCursor(before, timeS, context)),
            onTap: (timeS, tempC) => {
              setState((before) => moveCursor(before, timeS, context));
              pick(timeS, tempC);
            },
            onKey: handleKey,
            onWidth: setWidthPx,
          }}
        />
      </div>
      <p id={ids.help} className="sr-only">
        {KEY_HELP}
      </p>
      <div className="px-4 desk:px-12">
        <ChartMoves state={state} durationS={durationS} onMove={move}>
          <Readout {...{ state, pyramid, unit, events, widthPx }} />
        </ChartMoves>
        <div className="flex flex-wrap items-center justify-between gap-x-8 gap-y-3 pb-4">
          {actions}
          <ChartLegend strip={strip} />
        </div>
        <ChartTable
          id={ids.table}
          {...{ pyramid, unit, events }}
          view={state.view}
          hasAllReadings={props.hasAllReadings}
        />
      </div>
    </figure>
  );
}

function tempOf(pyramid: Pyramid, timeS: number): number {
  return pyramid.tempsC[nearestReading(pyramid, timeS)] ?? 0;
}

type ChartMovesProps = {
  state: ChartState;
  durationS: number;
  onMove: (move: ChartMove) => void;
  children: ReactNode;
};

/** In, out, earlier, later, whole; and in words what is shown. */
function ChartMoves({ state: { view }, durationS, onMove, children }: ChartMovesProps) {
  const whole = isWhole(view, durationS);
  const moves: [string, ChartMove, boolean][] = [
    ['In', { kind: 'zoom', factor: ZOOM_IN }, false],
    ['Out', { kind: 'zoom', factor: ZOOM_OUT }, whole],
    ['Earlier', { kind: 'page', by: -1 }, view.fromS <= 0],
    ['Later', { kind: 'page', by: 1 }, view.toS >= durationS],
    ['Whole run', { kind: 'whole' }, whole],
  ];
  return (
    <div className="flex flex-wrap items-center justify-between gap-x-6 pt-1">
      <div role="group" aria-label="Move along the chart" className="-ml-1 flex flex-wrap gap-x-3">
        {moves.map(([word, move, isIdle]) => (
          <Word
            key={word}
            className="min-w-12 justify-center aria-disabled:cursor-default aria-disabled:no-underline aria-disabled:text-print"
            aria-disabled={isIdle}
            onClick={() => !isIdle && onMove(move)}
          >
            {word}
          </Word>
        ))}
      </div>
      <p className="fig text-[1.0625rem] font-stretch-[92%]">
        <span className="text-print">shown </span>
        {formatMoment(view.fromS)} to {formatMoment(Math.min(view.toS, durationS))}
        <span className="text-print"> of {formatMoment(durationS)}</span>
      </p>
      {children}
    </div>
  );
}

type ReadoutProps = {
  state: ChartState;
  pyramid: Pyramid;
  unit: DisplayUnit;
  events: ChartEvent[];
  widthPx: number;
};

/** The reading under the cursor. Screen readers hear it at most twice a second. */
function Readout({ state: { cursorS, view }, pyramid, unit, events, widthPx }: ReadoutProps) {
  const pixelS = (view.toS - view.fromS) / widthPx;
  const event = cursorS === null ? null : eventAt(events, cursorS, 2 * pixelS);
  const time = cursorS === null ? '' : formatMoment(cursorS);
  const temp = cursorS === null ? '' : formatTemp(tempOf(pyramid, cursorS), unit);
  const said = useThrottled([time, temp, event?.words].filter(Boolean).join(', '), 500);
  return (
    <div className="fig flex min-h-touch min-w-[15ch] flex-1 items-center justify-end gap-3 text-[1.0625rem]">
      {cursorS === null ? (
        <span className="text-small text-print">Touch the trace, or point at it, to read it.</span>
      ) : (
        <span aria-hidden="true" className="flex items-baseline gap-3">
          <span className="text-print">{time}</span>
          <strong className="text-figure">{temp}</strong>
          {event && <span className="max-w-[30ch] truncate">{event.words}</span>}
        </span>
      )}
      <span role="status" className="sr-only">
        {said}
      </span>
    </div>
  );
}
