import {
  FACES,
  type Disc,
  type HalfDisc,
  type Ink,
  type Line,
  type Shape,
  type Words,
} from './shapes.ts';

/** What the painter needs of a canvas; a test hands in a recorder. */
export type Brush = Pick<
  CanvasRenderingContext2D,
  | 'save'
  | 'restore'
  | 'beginPath'
  | 'moveTo'
  | 'lineTo'
  | 'rect'
  | 'arc'
  | 'clip'
  | 'fill'
  | 'stroke'
  | 'fillRect'
  | 'fillText'
  | 'strokeText'
  | 'fillStyle'
  | 'strokeStyle'
  | 'lineWidth'
  | 'lineJoin'
  | 'lineCap'
  | 'globalAlpha'
  | 'font'
  | 'textAlign'
> & { fontStretch?: CanvasRenderingContext2D['fontStretch'] };

/** Colours as the stylesheet has them now. */
export type Paint = { colours: Record<Ink, string> };

/** Lays shapes on a canvas that is scaled to CSS pixels. */
export function paintShapes(brush: Brush, shapes: Shape[], paint: Paint): void {
  for (const shape of shapes) {
    switch (shape.kind) {
      case 'line':
        paintLine(brush, shape, paint);
        break;
      case 'bar':
        brush.fillStyle = paint.colours[shape.ink];
        brush.fillRect(shape.box.left, shape.box.top, shape.box.width, shape.box.height);
        break;
      case 'disc':
        paintDisc(brush, shape, paint);
        break;
      case 'half-disc':
        paintHalfDisc(brush, shape, paint);
        break;
      case 'words':
        paintWords(brush, shape, paint);
        break;
    }
  }
}

function paintLine(brush: Brush, line: Line, { colours }: Paint): void {
  brush.save();
  if (line.clip) {
    const { left, top, width, height } = line.clip;
    brush.beginPath();
    brush.rect(left, top, width, height);
    brush.clip();
  }
  brush.globalAlpha = line.opacity ?? 1;
  brush.strokeStyle = colours[line.ink];
  brush.lineWidth = line.widthPx;
  brush.lineJoin = line.round ? 'round' : 'miter';
  brush.lineCap = line.round ? 'round' : 'butt';
  brush.beginPath();
  tracePen(brush, line.path);
  brush.stroke();
  brush.restore();
}

/** Moves the pen along a path whose NaN pairs lift it. */
export function tracePen(
  pen: { moveTo(x: number, y: number): void; lineTo(x: number, y: number): void },
  path: number[],
): void {
  let isDown = false;
  for (let i = 0; i + 1 < path.length; i += 2) {
    const x = path[i]!;
    const y = path[i + 1]!;
    if (Number.isNaN(x)) isDown = false;
    else if (isDown) pen.lineTo(x, y);
    else {
      pen.moveTo(x, y);
      isDown = true;
    }
  }
}

function paintDisc(brush: Brush, disc: Disc, { colours }: Paint): void {
  brush.beginPath();
  brush.arc(disc.x, disc.y, disc.r, 0, 2 * Math.PI);
  // The rim first where it is the paper's: it stands round the disc, not on it.
  if (disc.rim && disc.rim === 'strip') strokeRim(brush, colours[disc.rim], disc.rimPx * 2);
  if (disc.fill) {
    brush.fillStyle = colours[disc.fill];
    brush.fill();
  }
  if (disc.rim && disc.rim !== 'strip') strokeRim(brush, colours[disc.rim], disc.rimPx);
}

function strokeRim(brush: Brush, colour: string, widthPx: number): void {
  brush.strokeStyle = colour;
  brush.lineWidth = widthPx;
  brush.stroke();
}

function paintHalfDisc(brush: Brush, half: HalfDisc, { colours }: Paint): void {
  const from = half.side === 'lower' ? 0 : Math.PI;
  brush.beginPath();
  brush.arc(half.x, half.y, half.r, from, from + Math.PI);
  brush.fillStyle = colours[half.fill];
  brush.fill();
}

function paintWords(brush: Brush, said: Words, { colours }: Paint): void {
  brush.font = `${said.weight} ${said.sizePx}px ${FACES[said.voice]}`;
  // Older Safari has no fontStretch: the figures are then a seventh wider, and the margins leave room for it.
  if ('fontStretch' in brush) brush.fontStretch = said.stretch;
  brush.textAlign = said.align;
  if (said.haloPx > 0) {
    brush.lineJoin = 'round';
    brush.lineWidth = said.haloPx;
    brush.strokeStyle = colours.strip;
    brush.strokeText(said.text, said.x, said.y);
  }
  brush.fillStyle = colours[said.ink];
  brush.fillText(said.text, said.x, said.y);
}
