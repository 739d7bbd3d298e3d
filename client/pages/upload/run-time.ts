/** A moment of a run as it is typed and shown: `m:ss`, `h:mm:ss`, tenths of a second where there are any. */
const TYPED = /^(?:(\d{1,3}):)?(\d{1,5}):([0-5]\d(?:[.,]\d{1,3})?)$/;

/** Seconds of a typed moment; null where it is not one. `90:15` is ninety minutes and a quarter. */
export function parseRunTime(typed: string): number | null {
  const match = TYPED.exec(typed.trim());
  if (!match) return null;
  const [, hours, minutes = '', seconds = ''] = match;
  if (hours !== undefined && Number(minutes) > 59) return null;
  return Number(hours ?? 0) * 3600 + Number(minutes) * 60 + Number(seconds.replace(',', '.'));
}

/** `7:48`, `1:02:03`, `0:12.5`. */
export function formatRunTime(timeS: number): string {
  const tenths = Math.round(timeS * 10);
  const wholeS = Math.floor(tenths / 10);
  const hours = Math.floor(wholeS / 3600);
  const minutes = Math.floor((wholeS % 3600) / 60);
  const seconds = String(wholeS % 60).padStart(2, '0');
  const fraction = tenths % 10 === 0 ? '' : `.${tenths % 10}`;
  if (hours === 0) return `${minutes}:${seconds}${fraction}`;
  return `${hours}:${String(minutes).padStart(2, '0')}:${seconds}${fraction}`;
}
