import { fromCelsius, toCelsius, type DisplayUnit } from '#shared/units.ts';

/** A rectangle in CSS pixels. */
export type Box = { left: number; top: number; width: number; height: number };

/** Where the paper lies and what it spans: all that turns a reading into a place. */
export type Frame = {
  /** The whole drawing, margins included. */
  sheet: Box;
  /** The ruled paper inside it. */
  plot: Box;
  fromS: number;
  toS: number;
  lowC: number;
  highC: number;
  /** The unit that the scale is engraved in. */
  unit: DisplayUnit;
  /** A phone's width: fewer words, closer strokes. */
  compact: boolean;
};

export function xOf(frame: Frame, timeS: number): number {
  const { plot, fromS, toS } = frame;
  return plot.left + ((timeS - fromS) / (toS - fromS)) * plot.width;
}

export function yOf(frame: Frame, tempC: number): number {
  const { plot, lowC, highC } = frame;
  return plot.top + ((highC - tempC) / (highC - lowC)) * plot.height;
}

export function timeAt(frame: Frame, x: number): number {
  const { plot, fromS, toS } = frame;
  return fromS + ((x - plot.left) / plot.width) * (toS - fromS);
}

export function tempAt(frame: Frame, y: number): number {
  const { plot, lowC, highC } = frame;
  return highC - ((y - plot.top) / plot.height) * (highC - lowC);
}

/** Multiples of `step` (in the frame's unit) from the foot of the scale to its head, with their °C. */
export function scaleValues(frame: Frame, step: number): { value: number; tempC: number }[] {
  const low = fromCelsius(frame.lowC, frame.unit);
  const high = fromCelsius(frame.highC, frame.unit);
  const values = [];
  for (let i = Math.ceil(low / step - 1e-9); i * step <= high + 1e-9; i++) {
    values.push({ value: i * step, tempC: toCelsius(i * step, frame.unit) });
  }
  return values;
}

/** Multiples of `stepS` in view. */
export function timesInView(frame: Frame, stepS: number): number[] {
  const times = [];
  for (let i = Math.ceil(frame.fromS / stepS - 1e-9); i * stepS <= frame.toS + 1e-9; i++) {
    times.push(i * stepS);
  }
  return times;
}

export function isInView(frame: Frame, timeS: number): boolean {
  return timeS >= frame.fromS && timeS <= frame.toS;
}
