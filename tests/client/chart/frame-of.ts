import type { Frame } from '#client/chart/frame.ts';

/** 18 minutes and 64–208 °F on a desk's paper, or whatever a test says instead. */
export function frameOf(changes: Partial<Frame> = {}): Frame {
  return {
    sheet: { left: 0, top: 0, width: 1440, height: 452 },
    plot: { left: 84, top: 24, width: 1206, height: 342 },
    fromS: 0,
    toS: 1080,
    lowC: (64 - 32) / 1.8,
    highC: (208 - 32) / 1.8,
    unit: 'F',
    compact: false,
    ...changes,
  };
}

export const PHONE_PLOT = { left: 42, top: 10, width: 282, height: 254 };

export function celsius(tempF: number): number {
  return (tempF - 32) / 1.8;
}
