import type { QuestionDraft } from '../outcome/question-draft.ts';
import { rangeOf } from '../tidy/choose-unit.ts';
import { fitsKind, SENSOR_ANSWERS, sensorWords, signalToC, type Signal } from './signal.ts';

/** Where an exhaust is met with, °C. */
const COLDEST_C = -20;
const HOTTEST_C = 150;

const KIND_WORDS = { mV: 'millivolts', ohm: 'ohms', kohm: 'kilohms' };

/** The question that is asked where the file does not name the sensor; the likeliest first. */
export function askSensor(
  signal: Signal,
  name: string,
  values: Float64Array,
  terminals: string,
): QuestionDraft {
  const { lowest, highest, median } = rangeOf(values.filter((value) => !Number.isNaN(value)));
  const { kind, terminalC } = signal;
  const toC = (sensor: (typeof SENSOR_ANSWERS)[number], value: number) =>
    signalToC(signal, sensor, value, terminalC ?? 0);
  const fitting = SENSOR_ANSWERS.filter((sensor) => fitsKind(sensor, kind));
  const likely = fitting.filter((sensor) => {
    const ends = [toC(sensor, lowest), toC(sensor, highest)];
    return ends.every((tempC) => tempC >= COLDEST_C && tempC <= HOTTEST_C);
  });
  const possible = fitting.filter((sensor) => !Number.isNaN(toC(sensor, median)));
  const ordered = [...new Set([...likely, ...possible])];
  return {
    about: 'unit',
    message: `${name} holds ${KIND_WORDS[kind]}, from ${lowest} to ${highest}, and no sensor is named. What gave them?`,
    options: (ordered.length > 0 ? ordered : fitting).map((sensor) => ({
      answer: sensor,
      label: sensorWords(sensor) + (kind === 'mV' ? terminals : ''),
    })),
  };
}
