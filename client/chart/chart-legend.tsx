import type { Call } from '#shared/analysis/analysis.ts';
import { wordCall } from '#shared/wording/word-call.ts';
import { CallGlyph } from '../components/glyphs.tsx';
import type { Shape } from './shapes.ts';
import { hatching } from './shapes.ts';
import type { Strip } from './strip.ts';
import { SvgShapes } from './svg-shapes.tsx';

const CALLS: Call[] = ['inside', 'within-allowance', 'too-close', 'outside'];

/** The marks that stand on this strip, and no others. */
export function ChartLegend({ strip }: { strip: Strip }) {
  const calls = CALLS.filter((call) => strip.points.some((point) => point.call === call));
  const hot = strip.hotSpans[0];
  return (
    <ul className="words flex flex-wrap gap-x-6 gap-y-1 text-[0.9375rem] text-print">
      {calls.map((call) => (
        <li key={call} className="flex items-center gap-2">
          <CallGlyph call={call} />
          {wordCall(call).word}
        </li>
      ))}
      {strip.points.some((point) => point.call === null) && (
        <li className="flex items-center gap-2">
          <UnjudgedGlyph />
          not judged
        </li>
      )}
      {hot && (
        <li className="flex items-center gap-2">
          <HatchSwatch />
          {hot.words[0]}
        </li>
      )}
    </ul>
  );
}

function UnjudgedGlyph() {
  const ring: Shape = {
    kind: 'disc',
    ...{ x: 9, y: 9, r: 3.3 },
    fill: null,
    rim: 'ink',
    rimPx: 1.5,
  };
  return (
    <svg className="size-[18px]" viewBox="0 0 18 18" aria-hidden="true">
      <SvgShapes shapes={[ring]} />
    </svg>
  );
}

const SWATCH = { left: 0.5, top: 0.5, width: 25, height: 13 };

/** What a hatched span looks like. */
export function HatchSwatch() {
  const { left, top, width, height } = SWATCH;
  const right = left + width;
  const foot = top + height;
  const shapes: Shape[] = [
    { kind: 'line', path: hatching(SWATCH, 5), ink: 'stop', widthPx: 1, clip: SWATCH },
    {
      kind: 'line',
      path: [left, top, right, top, right, foot, left, foot, left, top],
      ink: 'stop',
      widthPx: 1,
    },
  ];
  return (
    <svg className="h-[14px] w-[26px] shrink-0" viewBox="0 0 26 14" aria-hidden="true">
      <SvgShapes shapes={shapes} />
    </svg>
  );
}
