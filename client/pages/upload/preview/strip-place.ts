import { SMALL_MARGINS } from '../../../chart/sheet.ts';

function plotWidth(widthPx: number): number {
  const { left, right } = SMALL_MARGINS;
  return Math.max(widthPx - left - right, 1);
}

/** A strip is never ruled for less than a minute. */
function ruledS(durationS: number): number {
  return Math.max(durationS, 60);
}

/** Where a moment lies across the sheet, 0 to 1. */
export function shareOf(timeS: number, durationS: number, widthPx: number): number {
  const { left } = SMALL_MARGINS;
  return (left + (timeS / ruledS(durationS)) * plotWidth(widthPx)) / widthPx;
}

/** The moment under a point of the sheet, s; may lie outside the record. */
export function timeAtPx(px: number, durationS: number, widthPx: number): number {
  return ((px - SMALL_MARGINS.left) / plotWidth(widthPx)) * ruledS(durationS);
}
