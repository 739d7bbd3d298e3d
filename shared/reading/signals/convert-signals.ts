import { toCelsius } from '../../units.ts';
import type { LogColumn, ReadWarning } from '../log-reading.ts';
import type { QuestionDraft } from '../outcome/question-draft.ts';
import type { RowStore } from '../rows/row-store.ts';
import { SKIP_WORDS } from '../words/skip-words.ts';
import { warning } from '../words/warning-words.ts';
import { askSensor } from './ask-sensor.ts';
import { isTerminalName } from './find-signal.ts';
import { sensorWords, signalToC, type SensorAnswer, type Signal } from './signal.ts';

export type ConvertedSignals =
  { kind: 'converted'; warnings: ReadWarning[] } | { kind: 'question'; question: QuestionDraft };

type Terminals = { name: string; temps: Float64Array; unit: NonNullable<LogColumn['unit']> };

/**
 * Columns of mV or ohm become °C where they stand. Asks where the file does not say which sensor gave them. A
 * value that the sensor cannot give has no reading; its row is named.
 *
 * @param columns the temperature columns, in the order of the store's
 */
export function convertSignals(store: RowStore, columns: LogColumn[]): ConvertedSignals {
  const terminals = terminalsOf(store, columns);
  const warnings: ReadWarning[] = [];
  for (const [place, { name, signal }] of columns.entries()) {
    if (!signal) continue;
    const values = store.temps[place]!.subarray(0, store.count);
    const { sensor } = signal;
    if (!sensor) {
      const terminal = terminalWords(signal, terminals);
      return { kind: 'question', question: askSensor(signal, name, values, terminal) };
    }
    convert(store, place, signal, sensor, terminals);
    const say =
      sensorWords(sensor) + (signal.kind === 'mV' ? terminalWords(signal, terminals) : '');
    warnings.push(warning('signal-converted', { column: name, value: signal.kind, say }));
  }
  return { kind: 'converted', warnings };
}

function terminalsOf(store: RowStore, columns: LogColumn[]): Terminals | null {
  const place = columns.findIndex(({ name, signal }) => !signal && isTerminalName(name));
  const column = columns[place];
  if (!column) return null;
  return { name: column.name, temps: store.temps[place]!, unit: column.unit ?? 'C' };
}

/** The assumption that every reading rests on, in words. */
function terminalWords({ terminalC }: Signal, terminals: Terminals | null): string {
  if (terminals) return `, terminals as in ${terminals.name}`;
  if (terminalC !== null) return `, terminals at ${terminalC} °C as the file states`;
  return ', terminals at 0 °C or already compensated';
}

function convert(
  store: RowStore,
  place: number,
  signal: Signal,
  sensor: SensorAnswer,
  terminals: Terminals | null,
): void {
  const values = store.temps[place]!;
  for (let i = 0; i < store.count; i++) {
    const value = values[i]!;
    const terminalC = terminals
      ? toCelsius(terminals.temps[i]!, terminals.unit)
      : (signal.terminalC ?? 0);
    values[i] = signalToC(signal, sensor, value, terminalC);
    if (Number.isNaN(values[i]) && !Number.isNaN(value)) {
      store.noReading[place]!.add(store.rows[i]!, SKIP_WORDS.noSuchSignal(String(value)));
    }
  }
}
