import type { DisplayUnit } from '#shared/units.ts';
import { drawMarks } from './draw-marks.ts';
import { drawNotes, placeNotes } from './draw-notes.ts';
import { drawHotSpan, drawPaper, drawWall } from './draw-paper.ts';
import { drawEdges, drawHoles, drawMinutes, drawScale } from './draw-scale.ts';
import { yOf, type Frame } from './frame.ts';
import { chooseGridSteps, type GridSteps } from './grid-steps.ts';
import { pyramidOfColumns } from './pyramid-of-columns.ts';
import type { Pyramid } from './pyramid.ts';
import { SMALL_MARGINS, frameOn, scaleFor, type Sheet } from './sheet.ts';
import { words, type Shape } from './shapes.ts';
import type { Bands, Strip } from './strip.ts';
import { SvgShapes } from './svg-shapes.tsx';
import { drawHotTrace, drawReadingDots, obstaclesOn, tracePath, traceReach } from './trace-path.ts';

type SmallStripProps = {
  strip: Strip;
  /** [s, lowest, highest] in °C, in order of time. */
  trace: [number, number, number][];
  unit: DisplayUnit;
  /** One sentence for people who do not see it. */
  name: string;
  /** Names for the stripes, written on the paper; null where they need none. */
  bandNames: { opens: string; closes: string } | null;
  widthPx?: number;
  heightPx?: number;
  className?: string;
};

/** A whole run on a small sheet, drawn as SVG so that it prints sharp and follows the theme by itself. */
export function SmallStrip({
  strip,
  trace,
  unit,
  name,
  bandNames,
  widthPx = 390,
  heightPx = 236,
  className = 'block h-auto w-full',
}: SmallStripProps) {
  const sheet: Sheet = { widthPx, heightPx, margins: SMALL_MARGINS, compact: true };
  const pyramid = pyramidOfColumns(trace, strip.gaps);
  const durationS = Math.max(pyramid.timesS.at(-1) ?? 0, 60);
  const scale = scaleFor(pyramid, strip.bands, unit);
  const frame = frameOn(sheet, { fromS: 0, toS: durationS }, scale);
  return (
    <svg
      className={className}
      viewBox={`0 0 ${widthPx} ${heightPx}`}
      role="img"
      aria-label={name}
      preserveAspectRatio="xMidYMid meet"
    >
      <SvgShapes shapes={drawSmallStrip(frame, strip, pyramid, bandNames)} />
    </svg>
  );
}

function drawSmallStrip(
  frame: Frame,
  strip: Strip,
  pyramid: Pyramid,
  bandNames: SmallStripProps['bandNames'],
): Shape[] {
  const steps = chooseGridSteps(frame);
  const columns = Math.round(frame.plot.width);
  const trace = tracePath(pyramid, frame, columns);
  const notes = placeNotes(frame, strip.notes, obstaclesOn(frame, strip, pyramid));
  return [
    ...drawPaper(frame, strip.bands, withoutMinor(steps)),
    ...(strip.bands ? drawWall(frame, strip.bands.highLimitC) : []),
    ...strip.hotSpans.flatMap((span) => drawHotSpan(frame, span)),
    { kind: 'line', path: trace, ink: 'strip', widthPx: 5, opacity: 0.85, round: true },
    { kind: 'line', path: trace, ink: 'ink', widthPx: 2, round: true },
    ...strip.hotSpans.flatMap((span) => drawHotTrace(pyramid, frame, span, columns)),
    ...drawReadingDots(pyramid, frame),
    drawEdges(frame),
    ...drawScale(frame, steps, 'left'),
    ...drawMinutes(frame, steps),
    ...drawHoles(frame, steps, frame.sheet.height - 8),
    ...(strip.bands && bandNames ? nameBands(frame, strip.bands, bandNames, pyramid) : []),
    ...drawNotes(notes),
    ...drawMarks(frame, strip.points),
  ];
}

/** A small sheet is ruled by its major lines alone. */
function withoutMinor(steps: GridSteps): GridSteps {
  return { ...steps, minorS: steps.majorS, minorDeg: steps.majorDeg };
}

/** Room for a mark that stands on the trace. */
const MARK_PX = 7;

/** The upper stripe is named above it, the lower one below it, at the side where the trace leaves room. */
function nameBands(
  frame: Frame,
  bands: Bands,
  { opens, closes }: { opens: string; closes: string },
  pyramid: Pyramid,
): Shape[] {
  const reach = traceReach(pyramid, frame);
  const right = frame.plot.left + frame.plot.width - 8;
  const place = (text: string, y: number): Shape => {
    const widthPx = text.length * 7;
    const isFree = (fromX: number) => {
      const met = reach(fromX - MARK_PX, fromX + widthPx + MARK_PX);
      return !met || met.top > y + 4 + MARK_PX || met.foot < y - 12 - MARK_PX;
    };
    const spare = frame.plot.width - widthPx - 16;
    const fromRight = [0, 0.25, 0.5, 0.75, 1].map((share) => right - widthPx - share * spare);
    const x = (fromRight.find(isFree) ?? right - widthPx) + widthPx;
    return words(text, { x, y }, { weight: 600, stretch: 'normal', align: 'right', haloPx: 4 });
  };
  return [
    place(opens, yOf(frame, bands.opensC + bands.opensTolK) - 6),
    place(closes, yOf(frame, bands.closesC - bands.closesTolK) + 17),
  ];
}
