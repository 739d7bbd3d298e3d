import type { Point } from '#shared/analysis/analysis.ts';
import { fromCelsius, fromKelvinStep, type DisplayUnit } from '#shared/units.ts';
import { drawCall } from './draw-marks.ts';
import { PEN_UP, vertical, type Ink, type Shape } from './shapes.ts';
import { SvgShapes } from './svg-shapes.tsx';

const WIDTH_PX = 168;
const HEIGHT_PX = 30;
const SIDE_PX = 6;

export type RatedBand = { midC: number; tolK: number };

type CloseUpProps = { point: Point; band: RatedBand; unit: DisplayUnit };

/** One point against its band on an engraved scale: the call made visible. The words stand beside it. */
export function CloseUp({ point, band, unit }: CloseUpProps) {
  return (
    <svg
      className="block overflow-visible"
      width={WIDTH_PX}
      height={HEIGHT_PX}
      viewBox={`0 0 ${WIDTH_PX} ${HEIGHT_PX}`}
      aria-hidden="true"
    >
      <SvgShapes shapes={drawCloseUp({ point, band, unit })} />
    </svg>
  );
}

export function drawCloseUp({ point, band, unit }: CloseUpProps): Shape[] {
  const mid = fromCelsius(band.midC, unit);
  const tol = fromKelvinStep(band.tolK, unit);
  const value = fromCelsius(point.tempC, unit);
  const u = fromKelvinStep(point.uTotalK, unit);
  // The band takes two fifths of the scale; a point far off widens it.
  const reach = Math.max(tol * 2.5, Math.abs(value - mid) + u + 1);
  const x = (degrees: number) =>
    WIDTH_PX / 2 + ((degrees - mid) / reach) * (WIDTH_PX / 2 - SIDE_PX);
  const fill = point.kind === 'cut-out' ? 'band-opens' : 'band-closes';
  return [
    {
      kind: 'bar',
      box: {
        left: x(mid - tol),
        top: 1,
        width: x(mid + tol) - x(mid - tol),
        height: HEIGHT_PX - 3,
      },
      ink: fill,
    },
    line(
      [...vertical(x(mid - tol), 1, HEIGHT_PX - 2), ...vertical(x(mid + tol), 1, HEIGHT_PX - 2)],
      'band-edge',
    ),
    line(engraved(mid, reach, x), 'print'),
    ...whisker(x(value), x(value - u), x(value + u), point.call === 'outside' ? 'stop' : 'ink'),
    ...drawCall(point.call, point.kind, { x: x(value), y: MIDDLE_Y, r: 4.6 }),
  ];
}

const MIDDLE_Y = HEIGHT_PX / 2 - 2;

/** A tick each degree, a longer one each five; each five alone where degrees would touch. */
function engraved(mid: number, reach: number, x: (degrees: number) => number): number[] {
  const foot = HEIGHT_PX - 2;
  const step = (WIDTH_PX - 2 * SIDE_PX) / (2 * reach) < 3 ? 5 : 1;
  const path = [SIDE_PX, foot, WIDTH_PX - SIDE_PX, foot, ...PEN_UP];
  for (let v = Math.ceil((mid - reach) / step) * step; v <= mid + reach; v += step) {
    path.push(x(v), foot, x(v), foot - (v % 5 === 0 ? 5 : 2.5), ...PEN_UP);
  }
  return path;
}

function whisker(x: number, low: number, high: number, ink: Ink): Shape[] {
  if (high - x < 6) return [];
  const cap = (at: number) => [at, MIDDLE_Y - 4, at, MIDDLE_Y + 4, ...PEN_UP];
  return [line([...cap(low), ...cap(high), low, MIDDLE_Y, high, MIDDLE_Y], ink, 1.1)];
}

function line(path: number[], ink: Ink, widthPx = 1): Shape {
  return { kind: 'line', path, ink, widthPx };
}
