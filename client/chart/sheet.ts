import { fromCelsius, toCelsius, type DisplayUnit } from '#shared/units.ts';
import type { Frame } from './frame.ts';
import type { Pyramid } from './pyramid.ts';
import { reachOf } from './pyramid.ts';
import type { Bands, Span } from './strip.ts';

/** Margins of the ruled paper, CSS px. */
export type Margins = { top: number; right: number; bottom: number; left: number };
export type Sheet = { widthPx: number; heightPx: number; margins: Margins; compact: boolean };

/** Of the small strip: handles laid over it find its paper by these. */
export const SMALL_MARGINS: Margins = { top: 10, right: 12, bottom: 40, left: 42 };

const DESK = { heightPx: 452, margins: { top: 24, right: 150, bottom: 86, left: 84 } };
const PHONE = { heightPx: 330, margins: { top: 10, right: 66, bottom: 66, left: 42 } };
const DESK_FROM_PX = 760;

/** The run's own chart at a width: a desk's paper, or a phone's. */
export function sheetFor(widthPx: number): Sheet {
  const compact = widthPx < DESK_FROM_PX;
  return { widthPx, compact, ...(compact ? PHONE : DESK) };
}

export function frameOn(
  sheet: Sheet,
  span: Span,
  scale: { lowC: number; highC: number; unit: DisplayUnit },
): Frame {
  const { widthPx, heightPx, margins, compact } = sheet;
  return {
    sheet: { left: 0, top: 0, width: widthPx, height: heightPx },
    plot: {
      left: margins.left,
      top: margins.top,
      width: Math.max(10, widthPx - margins.left - margins.right),
      height: heightPx - margins.top - margins.bottom,
    },
    ...span,
    ...scale,
    compact,
  };
}

/** From under the coldest reading to over the wall, on round figures of the reader's unit. */
export function scaleFor(
  pyramid: Pyramid,
  bands: Bands | null,
  unit: DisplayUnit,
): { lowC: number; highC: number; unit: DisplayUnit } {
  const reach = reachOf(pyramid, 0, pyramid.tempsC.length) ?? { lowC: 20, highC: 70 };
  const printed = bands ? [bands.highLimitC, bands.closesC - bands.closesTolK] : [];
  const [roomAbove, roomOverTrace, step] = unit === 'F' ? [12, 8, 4] : [7, 4, 2];
  const high = Math.max(
    ...printed.map((tempC) => fromCelsius(tempC, unit) + roomAbove),
    fromCelsius(reach.highC, unit) + roomOverTrace,
  );
  const low = fromCelsius(Math.min(reach.lowC, ...printed), unit) - step;
  return {
    lowC: toCelsius(Math.floor(low / step) * step, unit),
    highC: toCelsius(Math.ceil(high / step) * step, unit),
    unit,
  };
}
