import { drawMarks } from './draw-marks.ts';
import { drawNotes, placeNotes } from './draw-notes.ts';
import { drawHotSpan, drawPaper, drawWall, nameHotSpan } from './draw-paper.ts';
import { drawHeatPen, drawMarkPen } from './draw-pens.ts';
import { drawBrackets, drawEdges, drawHoles, drawMinutes, drawScale } from './draw-scale.ts';
import type { Frame } from './frame.ts';
import { chooseGridSteps } from './grid-steps.ts';
import type { Pyramid } from './pyramid.ts';
import type { Shape } from './shapes.ts';
import type { Strip } from './strip.ts';
import { drawHotTrace, drawReadingDots, obstaclesOn } from './trace-path.ts';

/** What is printed: paper, stripes, ruling, wall, hatched spans. Laid down before the trace. */
export function drawUnderTrace(frame: Frame, strip: Strip): Shape[] {
  return [
    ...drawPaper(frame, strip.bands, chooseGridSteps(frame)),
    ...(strip.bands ? drawWall(frame, strip.bands.highLimitC) : []),
    ...strip.hotSpans.flatMap((span) => drawHotSpan(frame, span)),
  ];
}

/** What is written and engraved: hot trace, scales, holes, pens, notes, marks. Laid over the trace. */
export function drawOverTrace(
  frame: Frame,
  strip: Strip,
  pyramid: Pyramid,
  columns: number,
): Shape[] {
  const steps = chooseGridSteps(frame);
  const notes = placeNotes(frame, strip.notes, obstaclesOn(frame, strip, pyramid));
  return [
    ...strip.hotSpans.flatMap((span) => drawHotTrace(pyramid, frame, span, columns)),
    ...drawReadingDots(pyramid, frame),
    drawEdges(frame),
    ...drawScale(frame, steps, 'left'),
    ...(frame.compact ? [] : drawScale(frame, steps, 'right')),
    ...(strip.bands ? drawBrackets(frame, strip.bands) : []),
    ...drawMinutes(frame, steps),
    ...drawPens(frame, strip),
    ...drawHoles(frame, steps, footOf(frame)),
    ...drawNotes(notes),
    ...strip.hotSpans.flatMap((span) => nameHotSpan(frame, span)),
    ...drawMarks(frame, strip.points),
  ];
}

function drawPens(frame: Frame, strip: Strip): Shape[] {
  const foot = frame.plot.top + frame.plot.height;
  const heatY = foot + (frame.compact ? 27 : 40);
  const marksY = heatY + (frame.compact ? 12 : 20);
  return [...drawHeatPen(frame, strip.heat, heatY), ...drawMarkPen(frame, strip.marks, marksY)];
}

/** The row of feed holes along the foot. */
function footOf({ sheet, compact }: Frame): number {
  return sheet.top + sheet.height - (compact ? 7 : 11);
}
