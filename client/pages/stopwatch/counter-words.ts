import type { GuardView } from '#shared/analysis/guard/guard-state.ts';
import {
  emptyTyping,
  figuresOf,
  wheelsOf,
  type Typing,
  type Wheel,
} from '#shared/recorder/keypad.ts';
import type { HandRun } from '#shared/recorder/replay-run.ts';
import { expectedAt, type Entry } from './use-entry.ts';
import { formatAt, formatElapsed, formatReading, formatTyped } from './format-elapsed.ts';

/** What stands beside the wheels: a printed line with its figure in ink, and what to do. */
export type CounterWords = { wheels: Wheel[]; printed: string; figure: string; todo: string };

type Situation = {
  entry: Entry;
  run: HandRun;
  nowS: number;
  view: Pick<GuardView, 'says' | 'unconfirmed'>;
  /** A live probe takes the readings. */
  isLive: boolean;
};

/** A kept value stands in the wheels for so long. */
const KEPT_SHOWN_S = 3;

export function counterWords(situation: Situation): CounterWords {
  const { entry } = situation;
  if (entry.free) return freeWords(entry.free);
  if (entry.typing) return typingWords(entry.typing, situation);
  const { kept } = entry;
  const isCalm = situation.view.says === 'quiet' || situation.view.says === 'watch';
  if (kept && isCalm && situation.nowS - kept.atS < KEPT_SHOWN_S) return keptWords(kept, situation);
  return waitingWords(situation);
}

function freeWords({ text, isDoubted }: NonNullable<Entry['free']>): CounterWords {
  const shown = Array.from(text.replace('-', '−'));
  const wheels = shown.map((figure): Wheel => ({
    figure,
    look: figure === '.' ? 'point' : 'typed',
  }));
  while (wheels.length < 3) {
    wheels.push({ figure: '', look: wheels.length === shown.length ? 'next' : 'open' });
  }
  return isDoubted
    ? { wheels, printed: 'That is far off.', figure: '', todo: 'Keep it again to keep it' }
    : { wheels, printed: 'Other value', figure: '', todo: 'Type it all, then Keep it' };
}

function typingWords(typing: Typing, { run }: Situation): CounterWords {
  const { hasTenths } = run.start;
  const expected = expectedAt(run, typing.atS ?? 0);
  const wheels = wheelsOf(typing, expected, run.start);
  const at = formatAt(typing.atS ?? 0);
  const last = run.readings.at(-1);
  if (typing.asks === 'hundreds') {
    return { wheels, printed: `Which hundred, at ${at}?`, figure: '', todo: 'Tap 0, 1 or 2' };
  }
  if (typing.asks === 'sure' && typing.doubted !== null) {
    const value = formatTyped(typing.doubted, hasTenths);
    const off = last && formatTyped(Math.abs(round(typing.doubted - last.temp)), hasTenths);
    const side = last && typing.doubted > last.temp ? 'above' : 'below';
    const printed = last
      ? `${value} is ${off} ${side} ${formatAt(last.atS)}`
      : `${value} is far off`;
    return { wheels, printed, figure: '', todo: `Tap ${typing.digits.at(-1)} again to keep it` };
  }
  const left = figuresOf(typing.asks, run.start) - typing.digits.length;
  const todo = left > 1 ? `${left} more figures` : hasTenths ? 'Tenths' : 'One more figure';
  return { wheels, printed: `Reading at ${at}`, figure: '', todo };
}

function keptWords({ temp, atS }: { temp: number; atS: number }, { run }: Situation): CounterWords {
  const text = formatTyped(temp, run.start.hasTenths);
  const padded = text.padStart(run.start.hasTenths ? 5 : 3, ' ');
  const wheels = Array.from(padded).map((figure): Wheel => ({
    figure: figure.trim(),
    look: figure === '.' ? 'point' : 'typed',
  }));
  return { wheels, printed: `Kept, ${formatAt(atS)}`, figure: '', todo: 'Undo takes it back' };
}

function waitingWords({ run, nowS, view, isLive }: Situation): CounterWords {
  const expected = expectedAt(run, nowS);
  const typing = emptyTyping(expected);
  const wheels = wheelsOf(typing, expected, run.start);
  const last = run.readings.at(-1);
  const figure = last ? formatReading(last, run.start.hasTenths) : '';
  const lastAt = last ? `Last, ${formatAt(last.atS)}:` : 'No reading yet';
  const figures = { last: 'the last two figures', all: 'all three figures' };
  const todo = `Type ${typing.asks === 'last' ? figures.last : figures.all}`;
  const { says, unconfirmed } = view;
  if (unconfirmed && last && !isLive) {
    return { wheels, printed: `${figure} is far off.`, figure: '', todo: 'Read again now' };
  }
  if (says === 'watch')
    return { wheels, printed: lastAt, figure, todo: 'Hand on the heat selector' };
  if (says === 'quiet' && isLive) {
    return { wheels, printed: lastAt, figure, todo: 'The probe reads; keys go on' };
  }
  if (says === 'quiet') return { wheels, printed: lastAt, figure, todo };
  return { wheels, printed: lastAt, figure, todo: `Elapsed ${formatElapsed(nowS)}` };
}

function round(value: number): number {
  return Math.round(value * 10) / 10;
}
