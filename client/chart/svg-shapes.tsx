import { useId } from 'react';
import type { Box } from './frame.ts';
import { tracePen } from './paint-shapes.ts';
import { FACES, type Disc, type HalfDisc, type Line, type Shape, type Words } from './shapes.ts';

/** The same shapes as SVG, whose colours follow the stylesheet by themselves, on paper too. */
export function SvgShapes({ shapes }: { shapes: Shape[] }) {
  const id = useId();
  return shapes.map((shape, i) => <SvgShape key={i} shape={shape} clipId={`${id}${i}`} />);
}

function SvgShape({ shape, clipId }: { shape: Shape; clipId: string }) {
  switch (shape.kind) {
    case 'line':
      return <SvgLine line={shape} clipId={clipId} />;
    case 'bar': {
      const { left, top, width, height } = shape.box;
      return <rect x={left} y={top} width={width} height={height} fill={`var(--${shape.ink})`} />;
    }
    case 'disc':
      return <SvgDisc disc={shape} />;
    case 'half-disc':
      return <path d={halfDisc(shape)} fill={`var(--${shape.fill})`} />;
    case 'words':
      return <SvgWords said={shape} />;
  }
}

function SvgLine({ line, clipId }: { line: Line; clipId: string }) {
  return (
    <>
      {line.clip && <ClipBox id={clipId} box={line.clip} />}
      <path
        d={pathOf(line.path)}
        fill="none"
        stroke={`var(--${line.ink})`}
        strokeWidth={line.widthPx}
        strokeLinejoin={line.round ? 'round' : 'miter'}
        strokeLinecap={line.round ? 'round' : 'butt'}
        opacity={line.opacity}
        clipPath={line.clip ? `url(#${clipId})` : undefined}
      />
    </>
  );
}

function ClipBox({ id, box }: { id: string; box: Box }) {
  return (
    <clipPath id={id}>
      <rect x={box.left} y={box.top} width={box.width} height={box.height} />
    </clipPath>
  );
}

function SvgDisc({ disc }: { disc: Disc }) {
  const isHalo = disc.rim === 'strip';
  return (
    <circle
      cx={round(disc.x)}
      cy={round(disc.y)}
      r={disc.r}
      fill={disc.fill ? `var(--${disc.fill})` : 'none'}
      stroke={disc.rim ? `var(--${disc.rim})` : 'none'}
      strokeWidth={isHalo ? disc.rimPx * 2 : disc.rimPx}
      paintOrder={isHalo ? 'stroke' : undefined}
    />
  );
}

function halfDisc({ x, y, r, side }: HalfDisc): string {
  const sweep = side === 'lower' ? 1 : 0;
  return `M${round(x + r)} ${round(y)}A${r} ${r} 0 0 ${sweep} ${round(x - r)} ${round(y)}Z`;
}

const ANCHORS = { left: 'start', center: 'middle', right: 'end' } as const;

function SvgWords({ said }: { said: Words }) {
  return (
    <text
      x={round(said.x)}
      y={round(said.y)}
      fontFamily={FACES[said.voice]}
      fontSize={said.sizePx}
      fontWeight={said.weight}
      fontStretch={said.stretch}
      textAnchor={ANCHORS[said.align]}
      fill={`var(--${said.ink})`}
      stroke={said.haloPx > 0 ? 'var(--strip)' : 'none'}
      strokeWidth={said.haloPx}
      strokeLinejoin="round"
      paintOrder="stroke"
    >
      {said.text}
    </text>
  );
}

export function pathOf(path: number[]): string {
  const parts: string[] = [];
  tracePen(
    {
      moveTo: (x, y) => parts.push(`M${round(x)} ${round(y)}`),
      lineTo: (x, y) => parts.push(`L${round(x)} ${round(y)}`),
    },
    path,
  );
  return parts.join('');
}

function round(px: number): number {
  return Math.round(px * 100) / 100;
}
