/** Accuracy classes that a probe's kind may have. */
export const PROBE_CLASSES = [
  'iec-1',
  'iec-2',
  'iec-3',
  'astm-standard',
  'astm-special',
  'pt-aa',
  'pt-a',
  'pt-b',
  'pt-c',
] as const;
export type ProbeClass = (typeof PROBE_CLASSES)[number];

/** Sensors that classes are defined for. */
export type ClassedSensor = 'K' | 'J' | 'T' | 'pt100';

/** ± the greater of `stepK` and `share`·|t|, or their sum; from `fromC` to `toC`. */
type Limit = { fromC: number; toC: number; stepK: number; share: number; adds?: true };

const thermocouple = (fromC: number, toC: number, stepK: number, share: number): Limit => ({
  fromC,
  toC,
  stepK,
  share,
});
const pt100 = (fromC: number, toC: number, stepK: number, share: number): Limit => ({
  ...thermocouple(fromC, toC, stepK, share),
  adds: true,
});

/**
 * IEC 60584-1:2013 tolerance classes; ASTM E230/E230M-12 limits of error, where two stretches meet at 0 °C; IEC
 * 60751:2008 classes, wire-wound ranges. Seen as makers and suppliers restate them, not in the standards themselves.
 */
const LIMITS: Record<ClassedSensor, Partial<Record<ProbeClass, readonly Limit[]>>> = {
  K: {
    'iec-1': [thermocouple(-40, 1000, 1.5, 0.004)],
    'iec-2': [thermocouple(-40, 1200, 2.5, 0.0075)],
    'iec-3': [thermocouple(-200, 40, 2.5, 0.015)],
    'astm-standard': [thermocouple(0, 1260, 2.2, 0.0075), thermocouple(-200, 0, 2.2, 0.02)],
    'astm-special': [thermocouple(0, 1260, 1.1, 0.004)],
  },
  J: {
    'iec-1': [thermocouple(-40, 750, 1.5, 0.004)],
    'iec-2': [thermocouple(-40, 750, 2.5, 0.0075)],
    'astm-standard': [thermocouple(0, 760, 2.2, 0.0075)],
    'astm-special': [thermocouple(0, 760, 1.1, 0.004)],
  },
  T: {
    'iec-1': [thermocouple(-40, 350, 0.5, 0.004)],
    'iec-2': [thermocouple(-40, 350, 1, 0.0075)],
    'iec-3': [thermocouple(-200, 40, 1, 0.015)],
    'astm-standard': [thermocouple(0, 370, 1, 0.0075), thermocouple(-200, 0, 1, 0.015)],
    'astm-special': [thermocouple(0, 370, 0.5, 0.004)],
  },
  pt100: {
    'pt-aa': [pt100(-50, 250, 0.1, 0.0017)],
    'pt-a': [pt100(-100, 450, 0.15, 0.002)],
    'pt-b': [pt100(-196, 600, 0.3, 0.005)],
    'pt-c': [pt100(-196, 600, 0.6, 0.01)],
  },
};

/** The classes of a sensor, the tightest first as its standard lists them. */
export function classesOf(sensor: ClassedSensor): ProbeClass[] {
  return PROBE_CLASSES.filter((name) => LIMITS[sensor][name] !== undefined);
}

/**
 * Half-width ±a of a class at a temperature, K: the sensor's alone, with no meter behind it.
 *
 * @throws {RangeError} the sensor has no such class, or the class does not reach that temperature
 */
export function classAccuracy(sensor: ClassedSensor, name: ProbeClass, tempC: number): number {
  const limits = LIMITS[sensor][name];
  if (!limits) throw new RangeError(`there is no class ${name} for ${sensor}`);
  const limit = limits.find(({ fromC, toC }) => tempC >= fromC && tempC <= toC);
  if (!limit) throw new RangeError(`class ${name} of ${sensor} does not reach ${tempC} °C`);
  const relativeK = limit.share * Math.abs(tempC);
  return limit.adds ? limit.stepK + relativeK : Math.max(limit.stepK, relativeK);
}
