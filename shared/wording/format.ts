import { fromCelsius, fromKelvinStep, type DisplayUnit } from '../units.ts';

const NBSP = '\u00a0';

/** A measured temperature, one decimal: `154.8 °F`, with a no-break space. */
export function formatTemp(tempC: number, unit: DisplayUnit): string {
  return `${fixed(fromCelsius(tempC, unit))}${NBSP}°${unit}`;
}

/** A rated temperature, without a needless decimal: `155 °F`. */
export function formatRated(tempC: number, unit: DisplayUnit): string {
  return `${plain(fromCelsius(tempC, unit))}${NBSP}°${unit}`;
}

/** A temperature difference in kelvin, in the reader's unit: `2.3 °F`. No offset, whatever the scale. */
export function formatStep(stepK: number, unit: DisplayUnit): string {
  return `${fixed(fromKelvinStep(stepK, unit))}${NBSP}°${unit}`;
}

/** `150–160 °F`, the span of a rated point with its tolerance. */
export function formatBand(middleC: number, tolK: number, unit: DisplayUnit): string {
  const low = plain(fromCelsius(middleC - tolK, unit));
  const high = plain(fromCelsius(middleC + tolK, unit));
  return `${low}–${high}${NBSP}°${unit}`;
}

/** `154.8 ± 2.3 °F`, both in the reader's unit. */
export function formatWithin(tempC: number, uK: number, unit: DisplayUnit): string {
  const value = fixed(fromCelsius(tempC, unit));
  return `${value}${NBSP}±${NBSP}${fixed(fromKelvinStep(uK, unit))}${NBSP}°${unit}`;
}

/** A span of time: `12 s` under a minute, `3:47`, `1:02:05`. */
export function formatSpan(spanS: number): string {
  const wholeS = Math.round(spanS);
  return wholeS < 60 ? `${wholeS}${NBSP}s` : formatMoment(wholeS);
}

/** A moment of a run as minutes and seconds: `7:48`, `0:12`, `1:02:05`. */
export function formatMoment(timeS: number): string {
  const wholeS = Math.max(0, Math.round(timeS));
  const seconds = String(wholeS % 60).padStart(2, '0');
  const minutes = Math.floor(wholeS / 60) % 60;
  const hours = Math.floor(wholeS / 3600);
  if (hours === 0) return `${minutes}:${seconds}`;
  return `${hours}:${String(minutes).padStart(2, '0')}:${seconds}`;
}

/** A rate of change in kelvin per second, told per minute: `12.0 °F a minute`. */
export function formatRate(rateKPerS: number, unit: DisplayUnit): string {
  return `${formatStep(rateKPerS * 60, unit)} a minute`;
}

/** A probability as people read it: `97 %`, and never a bare 0 or 100 for what is not certain. */
export function formatProbability(probability: number): string {
  if (probability > 0.999) return `over 99.9${NBSP}%`;
  if (probability < 0.001) return `under 0.1${NBSP}%`;
  const percent = probability * 100;
  return `${percent > 99 || percent < 1 ? percent.toFixed(1) : percent.toFixed(0)}${NBSP}%`;
}

function fixed(value: number): string {
  const text = value.toFixed(1);
  return (text === '-0.0' ? '0.0' : text).replace('-', '−');
}

function plain(value: number): string {
  return fixed(value).replace(/\.0$/, '');
}
