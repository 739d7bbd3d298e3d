import { fromCelsius, toCelsius, type DisplayUnit } from '#shared/units.ts';
import { frameOn, type Sheet } from './sheet.ts';
import type { Frame } from './frame.ts';
import type { Bands } from './strip.ts';

const PX_PER_MINUTE = 43.2;
/** A quarter and more of the width stays blank ahead of the pen: there the forecast is drawn. */
const PEN_SHARE = 0.66;
/** Under this height the feed holes give way. */
const HOLES_FROM_PX = 130;

/** The sheet of the live strip: no scale at the left, the pen's pointer at the right. */
export function liveSheet(widthPx: number, heightPx: number): Sheet {
  const bottom = heightPx < HOLES_FROM_PX ? 20 : 38;
  return { widthPx, heightPx, compact: true, margins: { top: 8, right: 66, bottom, left: 0 } };
}

/** Does the sheet have room for the feed holes under the minutes? */
export function hasHoles({ heightPx }: Sheet): boolean {
  return heightPx >= HOLES_FROM_PX;
}

/**
 * Where the paper stands: it moves when a reading comes, and not between.
 *
 * @param lastS the newest reading, s of the run
 * @param lowestC of the readings in view
 */
export function liveFrame(
  sheet: Sheet,
  lastS: number,
  reach: { lowC: number; highC: number } | null,
  bands: Bands | null,
  unit: DisplayUnit,
): Frame {
  const plotPx = Math.max(60, sheet.widthPx - sheet.margins.right);
  const spanS = (plotPx / PX_PER_MINUTE) * 60;
  const fromS = Math.max(0, lastS - PEN_SHARE * spanS);
  return frameOn(sheet, { fromS, toS: fromS + spanS }, liveScale(reach, bands, unit));
}

/** How much of the record lies on the paper. */
export function liveSpanS(sheet: Sheet): number {
  return (Math.max(60, sheet.widthPx - sheet.margins.right) / PX_PER_MINUTE) * 60;
}

/** From under the coldest reading in view to over the wall, on whole tens. */
function liveScale(
  reach: { lowC: number; highC: number } | null,
  bands: Bands | null,
  unit: DisplayUnit,
) {
  const [step, room] = unit === 'F' ? [4, 8] : [2, 4];
  const known = [
    ...(bands ? [bands.highLimitC, bands.closesC - bands.closesTolK] : []),
    ...(reach ? [reach.lowC, reach.highC] : []),
  ];
  const inUnit = known.map((tempC) => fromCelsius(tempC, unit));
  const [low, high] = inUnit.length > 0 ? [Math.min(...inUnit), Math.max(...inUnit)] : [60, 200];
  return {
    lowC: toCelsius(Math.floor((low - room / 2) / step) * step, unit),
    highC: toCelsius(Math.ceil((high + room) / step) * step, unit),
    unit,
  };
}
