import { useState } from 'react';
import { expectReading, plausibleSpan, type Expected } from '#shared/recorder/expect-reading.ts';
import { emptyTyping, typeDigit, type KeypadSetup, type Typing } from '#shared/recorder/keypad.ts';
import { otherValueOf, typeOther } from '#shared/recorder/other-value.ts';
import type { HandRun } from '#shared/recorder/replay-run.ts';
import { asByHand } from './format-elapsed.ts';
import type { Recorder } from './recorder.ts';

/** What is being typed, and what was kept last. Nothing of it is in the run yet. */
export type Entry = {
  /** null: nothing typed. */
  typing: Typing | null;
  /** Figure by figure under *Other value*; null where that is not open. */
  free: { text: string; atS: number; isDoubted: boolean } | null;
  /** Shown for a moment after it was kept. */
  kept: { temp: number; atS: number } | null;
};

const NOTHING: Entry = { typing: null, free: null, kept: null };

export type EntryParts = {
  recorder: Recorder;
  run: HandRun;
  onKept: () => void;
  onTakenBack: (words: string) => void;
};

/** The keys' side of the recorder: from taps to a reading. */
export function useEntry({ recorder, run, onKept }: EntryParts) {
  const [entry, setEntry] = useState(NOTHING);
  const setup: KeypadSetup = { unit: run.start.unit, hasTenths: run.start.hasTenths };

  async function keep(temp: number, atS: number): Promise<void> {
    setEntry(NOTHING);
    if (!(await recorder.read(temp, atS))) return;
    onKept();
    setEntry((now) => (now === NOTHING ? { ...NOTHING, kept: { temp, atS } } : now));
  }

  function typeGuided(figure: string, downAtS: number): void {
    const expected = expectedAt(run, entry.typing?.atS ?? downAtS);
    const typing = entry.typing ?? emptyTyping(expected);
    const answer = typeDigit(typing, figure, downAtS, expected, setup);
    if (answer.does === 'keep') void keep(answer.temp, answer.atS);
    else setEntry({ ...NOTHING, typing: answer.typing });
  }

  function typeFree(free: NonNullable<Entry['free']>, key: string): void {
    setEntry({ ...NOTHING, free: { ...free, text: typeOther(free.text, key), isDoubted: false } });
  }

  function keepFree({ text, atS, isDoubted }: NonNullable<Entry['free']>): void {
    const temp = otherValueOf(text);
    if (temp === null) return setEntry(NOTHING);
    if (isDoubted || isPlausible(temp, expectedAt(run, atS), setup)) return void keep(temp, atS);
    setEntry({ ...NOTHING, free: { text, atS, isDoubted: true } });
  }

  return {
    entry,
    setup,
    figure(figure: string, downMonoMs: number): void {
      if (entry.free) typeFree(entry.free, figure);
      else typeGuided(figure, recorder.at(downMonoMs));
    },
    same(downMonoMs: number): void {
      const last = run.readings.at(-1);
      if (entry.free) typeFree(entry.free, entry.free.text === '' ? '-' : '.');
      else if (last) void keep(asByHand(last, setup), recorder.at(downMonoMs));
    },
    other(downMonoMs: number): void {
      if (entry.free) return keepFree(entry.free);
      // The moment is that of the first key touched for this reading.
      const free = {
        text: '',
        atS: entry.typing?.atS ?? recorder.at(downMonoMs),
        isDoubted: false,
      };
      setEntry({ ...NOTHING, free });
    },
    /** Takes back a figure or what was typed. @returns false where nothing was typed */
    undo(): boolean {
      if (entry.free) {
        const text = entry.free.text.slice(0, -1);
        const free = entry.free.text === '' ? null : { ...entry.free, text, isDoubted: false };
        setEntry({ ...NOTHING, free });
        return true;
      }
      const wasTyping = entry.typing !== null;
      setEntry(NOTHING);
      return wasTyping;
    },
  };
}

export type EntryKeys = ReturnType<typeof useEntry>;

export function expectedAt({ readings }: HandRun, atS: number): Expected | null {
  return expectReading(readings.at(-1) ?? null, readings.at(-2) ?? null, atS);
}

const DOUBT_BEYOND = { F: 25, C: 25 / 1.8 } as const;
const FIRST_SPAN = { F: [-40, 400], C: [-40, 205] } as const;

function isPlausible(temp: number, expected: Expected | null, { unit }: KeypadSetup): boolean {
  if (!expected) return temp >= FIRST_SPAN[unit][0] && temp <= FIRST_SPAN[unit][1];
  const { low, high } = plausibleSpan(expected, unit);
  const beyond = DOUBT_BEYOND[unit];
  return (
    temp >= Math.min(low, expected.temp - beyond) && temp <= Math.max(high, expected.temp + beyond)
  );
}
