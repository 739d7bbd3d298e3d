import type { NewCalibration } from '#shared/schemas/calibrations.ts';
import type { NewProbe, NewRating } from '#shared/schemas/ratings.ts';

/** All figures are invented for makes that do not exist. */
const cycling = (name: string, [opens, closes]: [number, number], tol = 5): NewRating => ({
  kind: 'cycling-thermostat',
  name,
  unit: 'F',
  opens,
  opensTol: 5,
  closes,
  closesTol: tol,
  overshoot: 10,
  undershoot: 10,
});

const safety = (kind: NewRating['kind'], name: string, points: Partial<NewRating>): NewRating => ({
  kind,
  name,
  unit: 'F',
  opens: 196,
  opensTol: 5,
  closes: null,
  closesTol: null,
  overshoot: 0,
  undershoot: 0,
  ...points,
});

export const DEMO_RATINGS: NewRating[] = [
  cycling('HL-155-25', [155, 130]),
  cycling('HL-155-15', [155, 140]),
  cycling('HL-155-40', [155, 115]),
  cycling('HL-155-G', [155, 122], 7),
  cycling('HL-140-20', [140, 120]),
  cycling('HL-175-25', [175, 150]),
  safety('thermal-fuse', 'HL-F196', { opens: 196 }),
  safety('high-limit', 'HL-L225', { opens: 225, opensTol: 7, closes: 185, closesTol: 9 }),
  safety('thermal-cut-off', 'HL-C352', { opens: 352, opensTol: 12 }),
];

type DemoProbe = NewProbe & {
  /** How long ago it was calibrated. */
  daysAgo: number | null;
};

const probe = (name: string, accuracy: number, rest: Partial<DemoProbe>): DemoProbe => ({
  name,
  kind: 'thermocouple-k',
  unit: 'F',
  accuracyClass: null,
  accuracy,
  responseS: 3,
  calibrationU: 0.5,
  calibratedAtMs: null,
  daysAgo: 64,
  notes: '',
  ...rest,
});

export const DEMO_PROBES: DemoProbe[] = [
  probe('K1', 2, { notes: 'Ada’s van' }),
  probe('K2', 2, { notes: 'Tom’s van', calibrationU: null, daysAgo: null }),
  probe('V4', 4, {
    kind: 'other',
    notes: 'Spare: reads whole degrees',
    calibrationU: null,
    daysAgo: null,
  }),
];

/** How one of the probes was calibrated, by name. */
export const DEMO_CALIBRATIONS: {
  probe: string;
  daysAgo: number;
  calibration: Omit<NewCalibration, 'madeAtMs'>;
}[] = [
  {
    probe: 'K2',
    daysAgo: 71,
    calibration: {
      kind: 'ice-and-boiling',
      unit: 'F',
      points: [
        { reference: null, readings: [31.9, 32.0, 31.9] },
        { reference: null, readings: [211.1, 211.0, 211.2] },
      ],
      pressureHPa: 1009,
      altitudeM: null,
      referenceName: '',
      referenceU: null,
      resolution: 0.1,
      drift: 1,
      intervalMonths: 12,
      notes: 'Kettle and flask on the bench',
    },
  },
];
