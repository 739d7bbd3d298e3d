import type { Box } from './frame.ts';

/**
 * What the drawing functions answer with: a list of shapes in CSS pixels, in the order in which they are laid down.
 * One painter lays them on a canvas (the run's chart), another makes SVG of them (small charts, print), so both
 * are the same drawing.
 */
export type Shape = Line | Bar | Disc | HalfDisc | Words;

/** A colour token of the stylesheet, without its dashes. */
export const INKS = [
  'paper',
  'strip',
  'ink',
  'print',
  'rule',
  'grid-major',
  'grid-minor',
  'band-opens',
  'band-closes',
  'band-edge',
  'stop',
  'pen2',
] as const;
export type Ink = (typeof INKS)[number];

/** `path` holds x, y, x, y …; a NaN pair lifts the pen. */
export type Line = {
  kind: 'line';
  path: number[];
  ink: Ink;
  widthPx: number;
  opacity?: number;
  round?: boolean;
  clip?: Box;
};

export type Bar = { kind: 'bar'; box: Box; ink: Ink };

export type Disc = {
  kind: 'disc';
  x: number;
  y: number;
  r: number;
  fill: Ink | null;
  rim: Ink | null;
  rimPx: number;
};

export type HalfDisc = {
  kind: 'half-disc';
  x: number;
  y: number;
  r: number;
  side: 'upper' | 'lower';
  fill: Ink;
};

export type Words = {
  kind: 'words';
  text: string;
  x: number;
  /** Of the baseline. */
  y: number;
  sizePx: number;
  weight: 400 | 500 | 600 | 700;
  voice: 'gothic' | 'serif';
  stretch: 'semi-condensed' | 'normal' | 'semi-expanded';
  align: 'left' | 'center' | 'right';
  ink: Ink;
  /** Width of the paper-coloured edge that parts words from what is under them. */
  haloPx: number;
};

/** The two voices; the families are those of the stylesheet. */
export const FACES = {
  gothic: "'FK Gothic', 'Arial Narrow', Arial, sans-serif",
  serif: "'FK Text', Georgia, 'Times New Roman', serif",
} as const;

export const PEN_UP = [NaN, NaN] as const;

/** A 1 px line lies on the pixel, not across two. */
export function crisp(px: number): number {
  return Math.round(px - 0.5) + 0.5;
}

export function horizontal(left: number, right: number, y: number): number[] {
  return [left, crisp(y), right, crisp(y), ...PEN_UP];
}

export function vertical(x: number, top: number, foot: number): number[] {
  return [crisp(x), top, crisp(x), foot, ...PEN_UP];
}

/** 45° strokes that rise to the right and fill a box; to be clipped to it. */
export function hatching(box: Box, apartPx: number): number[] {
  const path: number[] = [];
  const foot = box.top + box.height;
  for (let x = box.left - box.height; x < box.left + box.width; x += apartPx) {
    path.push(x, foot, x + box.height, box.top, ...PEN_UP);
  }
  return path;
}

/** Words on the chart: the gothic's semi-condensed figures unless said otherwise. */
export function words(
  text: string,
  at: { x: number; y: number },
  style: Partial<Omit<Words, 'kind' | 'text' | 'x' | 'y'>> = {},
): Words {
  return {
    kind: 'words',
    text,
    ...at,
    sizePx: 13,
    weight: 400,
    voice: 'gothic',
    stretch: 'semi-condensed',
    align: 'left',
    ink: 'print',
    haloPx: 0,
    ...style,
  };
}
