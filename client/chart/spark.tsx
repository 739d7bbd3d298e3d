import type { RunCard } from '#shared/schemas/runs.ts';
import { drawHotSpan } from './draw-paper.ts';
import { xOf, yOf, type Frame } from './frame.ts';
import type { Shape } from './shapes.ts';
import { SvgShapes } from './svg-shapes.tsx';

const WIDTH_PX = 132;
const HEIGHT_PX = 36;

/** A whole run at the height of a line of text. The calls and the outcome stand beside it in words. */
export function Spark({ card, className = '' }: { card: RunCard; className?: string }) {
  return (
    <svg
      className={`border border-grid-major bg-strip ${className}`}
      width={WIDTH_PX}
      height={HEIGHT_PX}
      viewBox={`0 0 ${WIDTH_PX} ${HEIGHT_PX}`}
      aria-hidden="true"
    >
      <SvgShapes shapes={drawSpark(card)} />
    </svg>
  );
}

export function drawSpark({ trace, bands, durationS, headline }: RunCard): Shape[] {
  const temps = trace.map(([, tempC]) => tempC);
  const printed = bands ? [bands.highLimitC, bands.closesC - bands.closesTolK] : [];
  const lowC = Math.min(...temps, ...printed, 25) - 3;
  const highC = Math.max(...temps, ...printed) + 2;
  const box = { left: 0, top: 0, width: WIDTH_PX, height: HEIGHT_PX };
  const span = { fromS: 0, toS: Math.max(durationS, 1) };
  const frame: Frame = {
    ...{ sheet: box, plot: box, lowC, unit: 'F', compact: true },
    highC: Number.isFinite(highC) ? highC : 100,
    ...span,
  };
  const path = trace.flatMap(([timeS, tempC]) => [xOf(frame, timeS), yOf(frame, tempC)]);
  return [
    { kind: 'bar', box, ink: 'strip' },
    ...(bands ? drawStripes(frame, bands) : []),
    ...(headline === 'runaway' ? drawHot(frame, trace, bands) : []),
    { kind: 'line', path, ink: 'ink', widthPx: 1.5, round: true },
  ];
}

type Bands = NonNullable<RunCard['bands']>;

function drawStripes(frame: Frame, bands: Bands): Shape[] {
  const stripe = (midC: number, tolK: number, ink: 'band-opens' | 'band-closes'): Shape => {
    const top = yOf(frame, midC + tolK);
    const height = yOf(frame, midC - tolK) - top;
    return { kind: 'bar', box: { left: 0, width: WIDTH_PX, top, height }, ink };
  };
  return [
    stripe(bands.opensC, bands.opensTolK, 'band-opens'),
    stripe(bands.closesC, bands.closesTolK, 'band-closes'),
  ];
}

/** A card carries no spans: the hatch stands where the trace last rose above its stripe up to its highest. */
function drawHot(frame: Frame, trace: RunCard['trace'], bands: Bands | null): Shape[] {
  const peak = trace.reduce((best, pair) => (pair[1] > best[1] ? pair : best), [0, -Infinity]);
  const topC = bands ? bands.opensC + bands.opensTolK : -Infinity;
  const below = trace.filter(([timeS, tempC]) => timeS < peak[0] && tempC <= topC).at(-1);
  const fromS = below?.[0] ?? 0;
  const span = { fromS, toS: peak[0], words: [], traceIsHot: true };
  return drawHotSpan(frame, span);
}
