import { buildPyramid, type Pyramid } from './pyramid.ts';
import type { Span } from './strip.ts';

/** Columns as readings: each gives its lowest and its highest, so that nothing it reached is lost. */
export function pyramidOfColumns(
  trace: readonly (readonly [number, number, number])[],
  gaps: Span[],
): Pyramid {
  const times: number[] = [];
  const temps: number[] = [];
  for (const [timeS, lowC, highC] of trace) {
    const isRising = lowC + highC >= 2 * (temps.at(-1) ?? lowC);
    times.push(timeS);
    temps.push(isRising ? lowC : highC);
    if (lowC === highC) continue;
    times.push(timeS);
    temps.push(isRising ? highC : lowC);
  }
  return buildPyramid(Float64Array.from(times), Float64Array.from(temps), gaps);
}
