/**
 * A time as people type it: `7:48`, `1:02:30`, or plain seconds.
 *
 * @returns s; null where it cannot be read
 */
export function readMoment(typed: string): number | null {
  const parts = typed.trim().replace(',', '.').split(':');
  if (parts.length > 3 || !parts.every((part) => /^\d+(\.\d+)?$/.test(part))) return null;
  const minor = parts.slice(1);
  if (minor.some((part) => Number(part) >= 60)) return null;
  return parts.reduce((total, part) => total * 60 + Number(part), 0);
}
