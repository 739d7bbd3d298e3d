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
