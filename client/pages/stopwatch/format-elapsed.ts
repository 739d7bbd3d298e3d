import type { HandReading } from '#shared/recorder/replay-run.ts';

/** `07:48`; from an hour on `1:02:05`. Seconds passed, never rounded up. */
export function formatElapsed(timeS: number): string {
  const wholeS = Math.floor(Math.max(0, timeS) + 1e-6);
  const two = (value: number) => String(value).padStart(2, '0');
  const minutes = Math.floor(wholeS / 60);
  if (minutes < 60) return `${two(minutes)}:${two(wholeS % 60)}`;
  return `${Math.floor(minutes / 60)}:${two(minutes % 60)}:${two(wholeS % 60)}`;
}

/** The moment of a reading as the counter says it: `7:48`. */
export function formatAt(timeS: number): string {
  return formatElapsed(timeS).replace(/^0(?=[0-9])/, '');
}

/** A value as it was typed: `141`, `54.3`, `−2`. */
export function formatTyped(temp: number, hasTenths = false): string {
  const text = hasTenths || !Number.isInteger(temp) ? temp.toFixed(1) : String(temp);
  return text.replace('-', '−');
}

type Reading = Pick<HandReading, 'temp' | 'from'>;

/** A reading of the run: as typed, and of a live probe always with its tenths, so that the figure keeps its width. */
export function formatReading({ temp, from }: Reading, hasTenths = false): string {
  return formatTyped(temp, hasTenths || from === 'probe');
}

/** What *Same* keeps: the reading in the figures in which this run is typed. */
export function asByHand({ temp, from }: Reading, { hasTenths }: { hasTenths: boolean }): number {
  if (from === 'hand') return temp;
  return hasTenths ? Math.round(temp * 10) / 10 : Math.round(temp);
}
