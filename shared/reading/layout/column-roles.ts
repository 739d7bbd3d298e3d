import { findUnit } from '../cells/find-unit.ts';
import type { ColumnRole } from '../log-reading.ts';

const TIME =
  /(?<![a-z])(time|elapsed|timestamp|date|datetime|clock|zeit|uhrzeit|datum|heure|temps|hora|fecha|tijd|t\s*[([/_]\s*(s|sec|min|ms|h)\b|t_?s|secs?|seconds?|sek|minutes?|mins?|hours?|ms|millis|epoch|unix|stamp|created.at)(?![a-z])/i;
const NOT_TIME = /(response|time.?out|life)/i;
const HUMIDITY = /(humid|feucht|humedad|vocht|\brh\b|%\s*rh|rh\s*%|r\.h\.)/i;
const COMMENT = /(comment|note|remark|event|alarm|status|state|message|bemerkung|mark\b)/i;
const TEMPERATURE =
  /(temp(?!late|o\b)|temperatur|exhaust|outlet|vent\b|vent[ _-]|thermo|room|ambient|inlet|intake|air\b|drum|probe|abluft|°|º|℃|℉)/i;
/** Measured or counted, but no temperature of the run. */
const OTHER =
  /(volt|batter|current|\bamps?\b|power|watt|energy|press|speed|rpm|fan|duty|pwm|signal|rssi|set.?point|\bset\b|target|\bsoll|heater|relay|valve|count|index|\bid\b|_id\b|\bno\.?$|^#$|number|nr\.?$|sample|record|serial|lat|lon|position|resist|ohm|dew.?point|limit|thresh|error|expiration|numeric)/i;
const COUNTER =
  /^(#|no\.?|nr\.?|n|index|idx|sample|record|reading|row|point|id|seq|count|number|scan)(\s*(#|no\.?|nr\.?|number|id))?$/i;

/** What a header says that its column is; null where it says nothing that is known. */
export function roleOfName(name: string): ColumnRole | null {
  if (name === '') return null;
  if (HUMIDITY.test(name)) return 'humidity';
  if (isCounterName(name)) return 'other';
  if (/temp/i.test(name) && !/set|target/i.test(name) && !/^temps?$/i.test(name))
    return 'temperature';
  if (OTHER.test(name)) return 'other';
  if (TIME.test(name) && !NOT_TIME.test(name) && !/^temps$/i.test(name)) return 'time';
  if (TEMPERATURE.test(name) || /^temps?$/i.test(name) || findUnit(name)) return 'temperature';
  return COMMENT.test(name) ? 'comment' : null;
}

export function isCounterName(name: string): boolean {
  return COUNTER.test(name.trim());
}

/** How well a name fits the exhaust of a dryer: the higher the better, below 0 a place beside it. */
export function exhaustRank(name: string): number {
  if (/exhaust|abluft|outlet|vent(?!il)|salida|sortie/i.test(name)) return 3;
  if (
    /room|ambient|inlet|intake|supply|outdoor|outside|internal|board|cold.?junction|\bcj\b|\bcjc\b|reference|\bref\b|housing|logger|device|case|dew/i.test(
      name,
    )
  ) {
    return -1;
  }
  if (/drum|air|dryer|trockner/i.test(name)) return 2;
  return /temp/i.test(name) ? 1 : 0;
}

/** A column of the room's temperature, used where nobody wrote the room down. */
export function isRoomName(name: string): boolean {
  return /\b(room|ambient|raum)\b/i.test(name.replace(/_/g, ' '));
}

/** Every column's own name: as in the file, made where it is empty, numbered where it comes twice. */
export function columnNames(header: string[] | null, width: number): string[] {
  const used = new Map<string, number>();
  return Array.from({ length: width }, (_, i) => {
    const name = header?.[i]?.trim() || `Column ${i + 1}`;
    const times = (used.get(name) ?? 0) + 1;
    used.set(name, times);
    return times === 1 ? name : `${name} (${times})`;
  });
}
