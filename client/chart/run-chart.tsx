import { useEffect, useRef } from 'react';
import uPlot from 'uplot';
import 'uplot/dist/uPlot.min.css';
import './run-chart.css';
import type { DisplayUnit } from '#shared/units.ts';
import { drawOverTrace, drawUnderTrace } from './draw-strip.ts';
import { tempAt } from './frame.ts';
import { attachGestures } from './gestures.ts';
import { paintShapes, tracePen, type Paint } from './paint-shapes.ts';
import { addCursorDot, moveDot, placeOfReading } from './cursor-dot.ts';
import type { Pyramid } from './pyramid.ts';
import { readPaint, watchPaint } from './read-paint.ts';
import type { Shape } from './shapes.ts';
import { frameOn, scaleFor, sheetFor } from './sheet.ts';
import type { Span, Strip } from './strip.ts';
import { tracePath } from './trace-path.ts';

/** What is on the paper. */
export type RunChartContent = {
  strip: Strip;
  pyramid: Pyramid;
  durationS: number;
  unit: DisplayUnit;
};

/** What the person does with it. */
export type RunChartHandlers = {
  onView: (view: Span) => void;
  onCursor: (timeS: number) => void;
  onTap: (timeS: number, tempC: number) => void;
  onKey: (event: KeyboardEvent) => void;
  onWidth: (plotWidthPx: number) => void;
};

type RunChartProps = RunChartContent & {
  view: Span;
  cursorS: number | null;
  /** Ids of what describes the chart and of its table twin. */
  describedBy: string;
  detailsId: string;
  name: string;
  handlers: RunChartHandlers;
};

/** The strip chart of a run on uPlot: the one component that knows it. View and readout are told from outside. */
export function RunChart(props: RunChartProps) {
  const { strip, pyramid, durationS, unit, view, cursorS, handlers } = props;
  const { describedBy, detailsId, name } = props;
  const host = useRef<HTMLDivElement>(null);
  const plot = useRef<StripPlot | null>(null);
  const latest = useRef(handlers);

  useEffect(() => {
    latest.current = handlers;
  });
  useEffect(() => {
    if (!host.current) return;
    const made = createStripPlot(host.current, () => latest.current);
    plot.current = made;
    return () => {
      made.destroy();
      plot.current = null;
    };
  }, []);
  useEffect(
    () => plot.current?.setContent({ strip, pyramid, durationS, unit }),
    [strip, pyramid, durationS, unit],
  );
  useEffect(() => plot.current?.setView(view), [view]);
  useEffect(() => plot.current?.setCursor(cursorS), [cursorS, view, pyramid]);
  useEffect(
    () => plot.current?.setNames({ name, describedBy, detailsId }),
    [name, describedBy, detailsId],
  );

  return <div ref={host} className="strip-plot" />;
}

type StripPlot = ReturnType<typeof createStripPlot>;

function createStripPlot(host: HTMLElement, handlers: () => RunChartHandlers) {
  let content: RunChartContent | null = null;
  let view: Span = { fromS: 0, toS: 1 };
  let paint: Paint = readPaint(host);
  let widthPx = Math.max(280, host.clientWidth);

  const scale = () =>
    content
      ? scaleFor(content.pyramid, content.strip.bands, content.unit)
      : { lowC: 0, highC: 1, unit: 'F' as const };
  let shownScale = scale();
  const frame = () => frameOn(sheetFor(widthPx), view, shownScale);

  const plot = new uPlot(
    {
      ...sizeOf(widthPx),
      padding: [
        () => marginOf('top'),
        () => marginOf('right'),
        () => marginOf('bottom'),
        () => marginOf('left'),
      ],
      legend: { show: false },
      axes: [{ show: false }, { show: false }],
      scales: {
        x: { time: false, range: () => [view.fromS, view.toS] },
        y: { range: () => [shownScale.lowC, shownScale.highC] },
      },
      cursor: {
        y: false,
        points: { show: false },
        drag: { x: true, y: false, setScale: false, dist: 6 },
        bind: {
          dblclick: () => null,
          mousedown: (_plot, _target, handler) => (event) => {
            if (!event.shiftKey) handler(event);
            return null;
          },
        },
      },
      series: [
        {},
        { stroke: () => paint.colours.ink, width: 2, points: { show: false }, paths: pathsOf },
      ],
      hooks: {
        drawClear: [() => lay(content ? drawUnderTrace(frame(), content.strip) : [])],
        draw: [() => lay(overTrace())],
        setSelect: [zoomToSelection],
      },
    },
    [
      [0, 1],
      [0, 1],
    ],
    host,
  );

  function marginOf(side: 'top' | 'right' | 'bottom' | 'left'): number {
    return sheetFor(widthPx).margins[side];
  }

  function columnCount(): number {
    return Math.max(2, Math.round(frame().plot.width * uPlot.pxRatio));
  }

  function pathsOf(): uPlot.Series.Paths {
    const stroke = new Path2D();
    if (content) {
      const ratio = uPlot.pxRatio;
      const path = tracePath(content.pyramid, frame(), columnCount());
      tracePen(
        stroke,
        path.map((px) => px * ratio),
      );
    }
    return { stroke, fill: null, flags: 0 };
  }

  function overTrace(): Shape[] {
    return content ? drawOverTrace(frame(), content.strip, content.pyramid, columnCount()) : [];
  }

  /** Shapes are in CSS pixels: the canvas is scaled for them and put back for uPlot. */
  function lay(shapes: Shape[]): void {
    const { ctx } = plot;
    ctx.save();
    ctx.setTransform(uPlot.pxRatio, 0, 0, uPlot.pxRatio, 0, 0);
    paintShapes(ctx, shapes, paint);
    ctx.restore();
  }

  function zoomToSelection(): void {
    const { left, width } = plot.select;
    if (width < 6) return;
    const { fromS, toS } = view;
    const sPerPx = (toS - fromS) / frame().plot.width;
    plot.setSelect({ left: 0, top: 0, width: 0, height: 0 }, false);
    handlers().onView({ fromS: fromS + left * sPerPx, toS: fromS + (left + width) * sPerPx });
  }

  const timeUnder = (clientX: number) => {
    const { left, width } = plot.over.getBoundingClientRect();
    const share = Math.min(1, Math.max(0, (clientX - left) / width));
    return view.fromS + share * (view.toS - view.fromS);
  };
  const dropGestures = attachGestures(plot.over, {
    view: () => view,
    durationS: () => content?.durationS ?? 1,
    timeAt: timeUnder,
    widthPx: () => frame().plot.width,
    setView: (next) => handlers().onView(next),
    tap: (clientX, clientY) => {
      const { top } = plot.over.getBoundingClientRect();
      handlers().onTap(timeUnder(clientX), tempAt(frame(), clientY - top + marginOf('top')));
    },
    hover: (clientX) => handlers().onCursor(timeUnder(clientX)),
  });
  const handleKey = (event: KeyboardEvent) => handlers().onKey(event);
  plot.over.addEventListener('keydown', handleKey);
  plot.over.tabIndex = 0;
  plot.over.setAttribute('role', 'application');
  const dot = addCursorDot(plot.over);

  const stopWatchingPaint = watchPaint(() => {
    paint = readPaint(host);
    plot.redraw(true);
  });
  const widths = new ResizeObserver(() => resize());
  widths.observe(host);

  function resize(): void {
    const next = Math.max(280, host.clientWidth);
    if (next !== widthPx) {
      widthPx = next;
      plot.setSize(sizeOf(widthPx));
    }
    handlers().onWidth(frame().plot.width);
  }

  return {
    setContent(next: RunChartContent) {
      content = next;
      shownScale = scale();
      plot.redraw(true, true);
    },
    setView(next: Span) {
      view = next;
      plot.setScale('x', { min: next.fromS, max: next.toS });
    },
    setCursor(timeS: number | null) {
      const place =
        timeS === null || !content ? null : placeOfReading(content.pyramid, frame(), timeS);
      plot.setCursor(place ?? { left: -10, top: -10 }, false);
      moveDot(dot, place);
    },
    setNames({
      name,
      describedBy,
      detailsId,
    }: Record<'name' | 'describedBy' | 'detailsId', string>) {
      plot.over.setAttribute('aria-label', name);
      plot.over.setAttribute('aria-describedby', describedBy);
      plot.over.setAttribute('aria-details', detailsId);
    },
    destroy() {
      dropGestures();
      plot.over.removeEventListener('keydown', handleKey);
      stopWatchingPaint();
      widths.disconnect();
      plot.destroy();
    },
  };
}

function sizeOf(widthPx: number): { width: number; height: number } {
  return { width: widthPx, height: sheetFor(widthPx).heightPx };
}
