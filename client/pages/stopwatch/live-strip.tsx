import { memo, useEffect, useRef, useState } from 'react';
import type { DisplayUnit } from '#shared/units.ts';
import { formatTemp } from '#shared/wording/format.ts';
import { drawLive, type LiveStrip as Drawn } from '../../chart/draw-live.ts';
import { xOf, yOf, type Frame } from '../../chart/frame.ts';
import { hasHoles, liveFrame, liveSheet, liveSpanS } from '../../chart/live-frame.ts';
import { SvgShapes } from '../../chart/svg-shapes.tsx';

/** `figure`: the newest reading as it stands on the pointer. */
type LiveStripProps = { strip: Drawn; unit: DisplayUnit; figure: string | null };

/** The trace as it is being written, with the pen at its end. Drawn anew when something was kept, not between. */
export const LiveStrip = memo(function LiveStrip({ strip, unit, figure }: LiveStripProps) {
  const { element, size } = useSize();
  const sheet = liveSheet(size.widthPx, size.heightPx);
  const lastS = strip.timesS.at(-1) ?? 0;
  const frame = liveFrame(
    sheet,
    lastS,
    reachIn(strip, lastS - liveSpanS(sheet)),
    strip.bands,
    unit,
  );
  return (
    <section className="sw-live" ref={element} aria-label="Trace">
      {size.heightPx > 40 && (
        <svg
          width={size.widthPx}
          height={size.heightPx}
          viewBox={`0 0 ${size.widthPx} ${size.heightPx}`}
          role="img"
          aria-label={traceSentence(strip, unit)}
        >
          <SvgShapes shapes={drawLive(frame, strip, hasHoles(sheet))} />
          {figure !== null && <PenHead {...{ frame, strip, figure }} />}
        </svg>
      )}
    </section>
  );
});

function PenHead({ frame, strip, figure }: { frame: Frame; strip: Drawn; figure: string }) {
  const x = xOf(frame, strip.timesS.at(-1) ?? 0);
  const y = yOf(frame, strip.tempsC.at(-1) ?? 0);
  const right = frame.sheet.width;
  const tip = frame.plot.left + frame.plot.width + 4;
  const flagY = Math.min(frame.sheet.height - 18, Math.max(18, y));
  return (
    <g>
      <path
        d={`M${tip} ${y}L${tip + 13} ${flagY - 18}H${right}v36H${tip + 13}z`}
        fill="var(--ink)"
      />
      <text
        className="fig"
        x={right - 7}
        y={flagY + 10}
        textAnchor="end"
        fontSize={figure.length > 4 ? 19 : figure.length > 3 ? 22 : 28}
        fontWeight="600"
        fill="var(--strip)"
      >
        {figure}
      </text>
      <circle
        cx={x}
        cy={y}
        r="4"
        fill="var(--ink)"
        stroke="var(--strip)"
        strokeWidth="2"
        paintOrder="stroke"
      />
    </g>
  );
}

function reachIn({ timesS, tempsC }: Drawn, fromS: number) {
  const shown = tempsC.filter((_, i) => timesS[i]! >= fromS);
  if (shown.length === 0) return null;
  return { lowC: Math.min(...shown), highC: Math.max(...shown) };
}

function traceSentence({ timesS, tempsC }: Drawn, unit: DisplayUnit): string {
  const lastC = tempsC.at(-1);
  if (lastC === undefined) return 'The paper, before the first reading.';
  const count = timesS.length === 1 ? 'One reading' : `${timesS.length} readings`;
  return `${count}; the last is ${formatTemp(lastC, unit)}.`;
}

function useSize() {
  const element = useRef<HTMLElement>(null);
  const [size, setSize] = useState({ widthPx: 390, heightPx: 0 });
  useEffect(() => {
    if (!element.current) return;
    const observer = new ResizeObserver(([entry]) => {
      if (!entry) return;
      const { width, height } = entry.contentRect;
      setSize({ widthPx: Math.round(width), heightPx: Math.round(height) });
    });
    observer.observe(element.current);
    return () => observer.disconnect();
  }, []);
  return { element, size };
}
