import { toCelsius } from '../../units.ts';
import {
  isSensorAnswer,
  fitsKind,
  type SensorAnswer,
  type Signal,
  type SignalKind,
} from './signal.ts';

const MILLIVOLT = /(?<![a-z])(mV|milli-?volts?)(?![a-z])/i;
const KILOHM = /(?<![a-z])k\s?(ohms?(?![a-z])|[Ωω\u2126])/i;
const OHM = /(?<![a-z])ohms?(?![a-z])|[Ω\u2126]/i;
/** Measured in mV or ohm, but by no temperature sensor. */
const NOT_SENSED =
  /batter|supply|excitation|bridge|shunt|element|heater|coil|vcc|vref|ref\w*\s*volt/i;

const THERMOCOUPLE =
  /(?:\btype[\s_-]*|thermocouple[\s_,-]*(?:type[\s_-]*)?|\btc[\s_-]*)([KJT])(?![a-z])|(?<![a-z])([KJT])[\s_-]*(?:type|thermocouple)/i;
const PT100 = /(?<![a-z])(pt[\s_-]?100|rtd)(?![a-z0-9])/i;
const NTC = /(?<![a-z])(?:ntc|thermistor)[\s_,-]*(\d+)\s*k/i;

/** A number that the end of a cell says is no temperature ("1.203 mV", "9.8 kΩ"); what stands before it is the value. */
export const CELL_SIGNAL = /\s*(mV|k\s?ohms?|ohms?|k?\s?[Ω\u2126])\.?$/i;

/** By what a cell's value is to be taken for mV or ohm. */
export function cellSignalFactor(match: RegExpExecArray): number {
  return /^\s*k/i.test(match[0]) ? 1000 : 1;
}

/** What a header or a unit row says that its column holds, where that is a voltage or a resistance. */
export function findSignalKind(title: string): SignalKind | null {
  if (NOT_SENSED.test(title)) return null;
  if (MILLIVOLT.test(title)) return 'mV';
  if (KILOHM.test(title)) return 'kohm';
  return OHM.test(title) ? 'ohm' : null;
}

/** The signal of a column; null where it holds none. Cells with units of their own outrank the header. */
export function findSignal(
  title: string,
  cells: string[],
  preamble: string[],
  answer: string | undefined,
): Signal | null {
  const kind = kindOfCells(title, cells) ?? findSignalKind(title) ?? statedKind(title, preamble);
  // A person may say that it is a temperature after all.
  if (kind === null || answer === 'F' || answer === 'C' || answer === 'K') return null;
  const named = [title, ...preamble].map((text) => findSensor(text, kind)).find(Boolean) ?? null;
  const said = isSensorAnswer(answer) && fitsKind(answer, kind) ? answer : null;
  return { kind, sensor: said ?? named, terminalC: statedTerminalC(preamble) };
}

function kindOfCells(title: string, cells: string[]): SignalKind | null {
  if (NOT_SENSED.test(title)) return null;
  for (const cell of cells) {
    const match = /\d/.test(cell) ? CELL_SIGNAL.exec(cell.trim()) : null;
    // Cells in kΩ are read as Ω: a meter that ranges by itself mixes both.
    if (match) return /mV/i.test(match[1]!) ? 'mV' : 'ohm';
  }
  return null;
}

/** "Units: mV" above the table speaks of columns that say nothing else. */
function statedKind(title: string, preamble: string[]): SignalKind | null {
  if (NOT_SENSED.test(title)) return null;
  const stated = preamble
    .filter((line) => /\bunits?\b/i.test(line))
    .map(findSignalKind)
    .filter((kind) => kind !== null);
  return stated[0] ?? null;
}

function findSensor(text: string, kind: SignalKind): SensorAnswer | null {
  const couple = THERMOCOUPLE.exec(text);
  const letter = (couple?.[1] ?? couple?.[2])?.toUpperCase();
  const ntc = NTC.exec(text);
  const answers = [
    letter && `mV-${letter}`,
    PT100.test(text) && 'ohm-Pt100',
    ntc && `ohm-NTC-${ntc[1]}k`,
  ];
  for (const answer of answers) {
    if (typeof answer === 'string' && isSensorAnswer(answer) && fitsKind(answer, kind)) {
      return answer;
    }
  }
  return null;
}

const TERMINAL =
  /(?:cold|reference|terminal)s?[\s_-]*(?:junction)?[^\d-]*(-?\d+(?:[.,]\d+)?)\s*[°º]?\s*([CF])?(?![a-z])/i;

/** "Reference junction: 0 °C" above the table. */
function statedTerminalC(preamble: string[]): number | null {
  for (const line of preamble) {
    const match = /junction|terminal/i.test(line) ? TERMINAL.exec(line) : null;
    if (match)
      return toCelsius(
        Number(match[1]!.replace(',', '.')),
        match[2]?.toUpperCase() === 'F' ? 'F' : 'C',
      );
  }
  return null;
}

/** A column of the temperature at a thermocouple's terminals. */
export function isTerminalName(name: string): boolean {
  return /cold.?j|\bcjc?\b|terminal|ref\w*[\s_.-]*(junction|temp)/i.test(name);
}
