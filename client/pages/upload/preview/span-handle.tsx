import { useRef, type KeyboardEvent, type PointerEvent } from 'react';
import { SMALL_MARGINS } from '../../../chart/sheet.ts';
import { clampTime, moveHandle } from '../move-handle.ts';
import { formatRunTime } from '../run-time.ts';
import { shareOf, timeAtPx } from './strip-place.ts';

type SpanHandleProps = {
  name: string;
  /** Its flag and most of its target lie inside the run: two runs that meet can then both be taken hold of. */
  side: 'start' | 'end';
  timeS: number;
  bounds: { lowS: number; highS: number };
  durationS: number;
  widthPx: number;
  onMove: (timeS: number) => void;
};

/** An end of a run on the strip: dragged with a finger, or a second at a time with the arrow keys. */
export function SpanHandle({
  name,
  side,
  timeS,
  bounds,
  durationS,
  widthPx,
  onMove,
}: SpanHandleProps) {
  const handle = useRef<HTMLDivElement>(null);

  function handlePointer(event: PointerEvent<HTMLDivElement>) {
    const strip = handle.current?.parentElement;
    if (!strip || !event.currentTarget.hasPointerCapture(event.pointerId)) return;
    const px = event.clientX - strip.getBoundingClientRect().left;
    onMove(clampTime(timeAtPx(px, durationS, widthPx), bounds));
  }

  function handleKey(event: KeyboardEvent) {
    const moved = moveHandle(event.key, timeS, bounds);
    if (moved === null) return;
    event.preventDefault();
    onMove(moved);
  }

  const { top, bottom } = SMALL_MARGINS;
  return (
    <div
      ref={handle}
      role="slider"
      tabIndex={0}
      aria-label={name}
      aria-valuemin={Math.round(bounds.lowS)}
      aria-valuemax={Math.round(bounds.highS)}
      aria-valuenow={Math.round(timeS)}
      aria-valuetext={formatRunTime(timeS)}
      onPointerDown={(event) => event.currentTarget.setPointerCapture(event.pointerId)}
      onPointerMove={handlePointer}
      onKeyDown={handleKey}
      className={`absolute w-12 cursor-ew-resize touch-none ${side === 'start' ? '-ml-3' : '-ml-9'}`}
      style={{ left: `${shareOf(timeS, durationS, widthPx) * 100}%`, top, bottom }}
    >
      <span
        className={`absolute inset-y-0 w-0.5 bg-ink ${side === 'start' ? 'left-[11px]' : 'right-[11px]'}`}
      />
      <span
        className={`absolute bottom-0 h-7 w-5 border-line border-ink bg-key ${side === 'start' ? 'left-[11px]' : 'right-[11px]'}`}
      />
    </div>
  );
}
