import { ntcTemp } from '../../probes/ntc.ts';
import { generalNtcCurve, TEN_K_CURVE_3 } from '../../probes/ntc-curves.ts';
import { pt100Temp } from '../../probes/pt100.ts';
import { thermocoupleTempWithTerminals } from '../../probes/thermocouple.ts';

/** What a column holds that is no temperature yet. */
export const SIGNAL_KINDS = ['mV', 'ohm', 'kohm'] as const;
export type SignalKind = (typeof SIGNAL_KINDS)[number];

type SensorFacts = {
  measures: 'mV' | 'ohm';
  /** As a question offers it and a warning names it. */
  words: string;
  /** °C from mV or ohm; terminals in °C, which only a thermocouple heeds. */
  toC: (value: number, terminalC: number) => number;
};

const ntcWords = (r25: string) =>
  `NTC of ${r25} ohm at 25 °C, the general curve with B25/85 = 3977 K`;

/** Sensors by the answer that names them (`--assume unit=mV-K`), the usual ones first. */
const SENSORS = {
  'mV-K': {
    measures: 'mV',
    words: 'type K thermocouple (IEC 60584-1)',
    toC: (mV, terminalC) => thermocoupleTempWithTerminals('K', mV, terminalC),
  },
  'mV-J': {
    measures: 'mV',
    words: 'type J thermocouple (IEC 60584-1)',
    toC: (mV, terminalC) => thermocoupleTempWithTerminals('J', mV, terminalC),
  },
  'mV-T': {
    measures: 'mV',
    words: 'type T thermocouple (IEC 60584-1)',
    toC: (mV, terminalC) => thermocoupleTempWithTerminals('T', mV, terminalC),
  },
  'ohm-Pt100': { measures: 'ohm', words: 'Pt100 (IEC 60751)', toC: pt100Temp },
  'ohm-NTC-10k': {
    measures: 'ohm',
    words: ntcWords('10,000'),
    toC: (ohm) => ntcTemp(generalNtcCurve(10_000), ohm),
  },
  'ohm-NTC-10k-3': {
    measures: 'ohm',
    words: 'NTC of 10,000 ohm at 25 °C, curve 3',
    toC: (ohm) => ntcTemp(TEN_K_CURVE_3, ohm),
  },
  'ohm-NTC-50k': {
    measures: 'ohm',
    words: ntcWords('50,000'),
    toC: (ohm) => ntcTemp(generalNtcCurve(50_000), ohm),
  },
  'ohm-NTC-100k': {
    measures: 'ohm',
    words: ntcWords('100,000'),
    toC: (ohm) => ntcTemp(generalNtcCurve(100_000), ohm),
  },
} as const satisfies Record<string, SensorFacts>;

export type SensorAnswer = keyof typeof SENSORS;

/** Every answer to "What are they?" that names a sensor. */
export const SENSOR_ANSWERS = Object.keys(SENSORS) as SensorAnswer[];

/** A column of voltages or resistances, and how it becomes °C; `sensor` is null where the file names none. */
export type Signal = {
  kind: SignalKind;
  sensor: SensorAnswer | null;
  /** Of the thermocouple's terminals as the file states it, °C; null where it states none. */
  terminalC: number | null;
};

export function isSensorAnswer(answer: string | undefined): answer is SensorAnswer {
  return answer !== undefined && Object.hasOwn(SENSORS, answer);
}

export function sensorWords(sensor: SensorAnswer): string {
  return SENSORS[sensor].words;
}

/** Whether a sensor gives what the column holds. */
export function fitsKind(sensor: SensorAnswer, kind: SignalKind): boolean {
  return (SENSORS[sensor].measures === 'mV') === (kind === 'mV');
}

/** A value as °C; NaN for one that the sensor cannot give, as from an open lead. */
export function signalToC(
  { kind }: Pick<Signal, 'kind'>,
  sensor: SensorAnswer,
  value: number,
  terminalC: number,
): number {
  if (Number.isNaN(value)) return NaN;
  const { toC }: SensorFacts = SENSORS[sensor];
  try {
    return toC(kind === 'kohm' ? value * 1000 : value, terminalC);
  } catch (error) {
    if (error instanceof RangeError) return NaN;
    throw error;
  }
}
