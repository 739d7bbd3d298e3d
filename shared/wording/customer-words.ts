import type { Analysis, Finding, FindingCode } from '../analysis/analysis.ts';
import type { Rating } from '../analysis/rating.ts';
import type { DisplayUnit } from '../units.ts';

/** What a customer's words depend on. */
export type CustomerRun = {
  analysis: Analysis;
  headline: Finding;
  judgedBy: Rating | null;
  unit: DisplayUnit;
  /** `electric`, `gas`, or as it was typed. */
  fuel: string;
  duct: 'on' | 'off';
  load: 'empty' | 'damp';
};

/** What a code means in a home, in plain words. */
export type CustomerWords = {
  heading: string;
  /** What the machine did, after a first sentence on the test itself. */
  summary: string;
  /** May it be used, where the outcome is not *stop* and not *proven*. */
  tonight: { answer: 'no' | 'ask-us'; sentence: string };
  meaning: string[];
  next: string[];
};

const LEAVE_OFF = 'Leave it off until it has been put right.';
const ASK = 'Ask us before you use it.';
const PIPE =
  'A blocked or crushed pipe to the outside can do this. So can lint inside the machine, or a worn fan or seal.';
const AGAIN = 'We run the test again after the repair, and show you both.';

/** One entry a code; the test of this table is that every code is here. */
export const CUSTOMER_WORDS: Record<FindingCode, CustomerWords> = {
  runaway: {
    heading: 'The heat did not switch off.',
    summary: 'It should stop by itself and start again, round after round. This time it went on.',
    tonight: { answer: 'no', sentence: LEAVE_OFF },
    meaning: [
      'A part that should stop the heat does not do so, or the heat is fed round it.',
      'A one-time safety fuse stands behind that part. It is a last resort, not a control.',
    ],
    next: ['We find which part it is before we fit anything.', AGAIN],
  },
  'heat-stays-on': {
    heading: 'Some heat stays on when it should be off.',
    summary: 'The heat stopped where it should, but the machine cooled far too slowly afterwards.',
    tonight: { answer: 'no', sentence: LEAVE_OFF },
    meaning: ['Part of the heater may still be fed when it should have no power.'],
    next: ['We check the heater cold and hot, since this can show only when it is hot.', AGAIN],
  },
  'heat-lost': {
    heading: 'The heat went away and did not come back.',
    summary: 'After heating, the air cooled down towards the room and stayed there.',
    tonight: { answer: 'ask-us', sentence: ASK },
    meaning: [
      'A one-time safety switch may have opened, or the timer may have ended the heat.',
      'A safety switch opens for a reason. Changing it alone would not be a repair.',
    ],
    next: ['We find why it opened before a new one goes in.', AGAIN],
  },
  'limit-cycling': {
    heading: 'The heat is cut short, again and again.',
    summary:
      'A safety switch near the heater kept stopping the heat before the air was hot enough.',
    tonight: { answer: 'no', sentence: LEAVE_OFF },
    meaning: [PIPE, 'Clothes dry slowly, and a switch meant for emergencies works all the time.'],
    next: ['We look at the pipe and the way of the air first.', AGAIN],
  },
  drifting: {
    heading: 'The heat stops at a different temperature each time.',
    summary:
      'It should stop at the same temperature in each round. Here it moved on with each one.',
    tonight: { answer: 'ask-us', sentence: ASK },
    meaning: [
      'Something changes as the machine warms: often a switch that lets go later and later.',
    ],
    next: ['We find which part it is before we fit anything.', AGAIN],
  },
  scattered: {
    heading: 'The heat stops at no steady temperature.',
    summary:
      'It should stop at the same temperature in each round. Here it varied from one to the next.',
    tonight: { answer: 'ask-us', sentence: ASK },
    meaning: ['A contact may come and go: a loose wire or a worn switch.'],
    next: ['We check the wiring and the switch.', AGAIN],
  },
  'opens-high': {
    heading: 'The heat stops too late.',
    summary: 'It stops and starts in a steady way, but hotter than this machine is made for.',
    tonight: { answer: 'no', sentence: LEAVE_OFF },
    meaning: [
      'The switch that stops the heat may be of the wrong kind, or may not sit as it should.',
    ],
    next: ['We compare the switch with the one this machine should have.', AGAIN],
  },
  'opens-low': {
    heading: 'The heat stops too early.',
    summary: 'It stops and starts in a steady way, but cooler than this machine is made for.',
    tonight: { answer: 'ask-us', sentence: ASK },
    meaning: [
      'Clothes take longer to dry. The switch that stops the heat may be worn or of the wrong kind.',
    ],
    next: ['We compare the switch with the one this machine should have.', AGAIN],
  },
  'closes-high': {
    heading: 'The heat comes back too early.',
    summary:
      'It stops where it should, but starts again before the air has cooled as far as it should.',
    tonight: { answer: 'ask-us', sentence: ASK },
    meaning: ['The switch that controls the heat may be worn or of the wrong kind.'],
    next: ['We compare the switch with the one this machine should have.', AGAIN],
  },
  'closes-low': {
    heading: 'The heat comes back too late.',
    summary:
      'It stops where it should, but the air cools further than it should before heat returns.',
    tonight: { answer: 'ask-us', sentence: ASK },
    meaning: [
      'Clothes take longer to dry. A switch or a connection may be slow or of the wrong kind.',
    ],
    next: ['We compare the switch with the one this machine should have.', AGAIN],
  },
  'below-cut-out': {
    heading: 'The machine does not get hot enough.',
    summary: 'The air levelled off before the temperature at which the heat should stop.',
    tonight: { answer: 'ask-us', sentence: ASK },
    meaning: [
      'The heater may give only part of its heat, or cold air may leak in.',
      'This test says nothing of the switch that stops the heat: it was never reached.',
    ],
    next: ['We check the heater, its supply and the seals.', AGAIN],
  },
  'no-heat': {
    heading: 'The machine does not heat.',
    summary: 'The air stayed near the temperature of the room.',
    tonight: { answer: 'ask-us', sentence: ASK },
    meaning: ['A safety switch may have opened, or the heater may be broken or without power.'],
    next: ['We find which part it is, and why it opened.', AGAIN],
  },
  mixed: {
    heading: 'This test did not give one clear answer.',
    summary: 'Some rounds were as they should be, and some were not.',
    tonight: { answer: 'ask-us', sentence: ASK },
    meaning: ['We do not call it sound, and we do not name a fault, on this test alone.'],
    next: ['We run a longer test.'],
  },
  'too-close': {
    heading: 'Close to the edge: not proven yet.',
    summary:
      'Nothing was clearly wrong. Some figures lie too near the edge of what is allowed to be sure.',
    tonight: { answer: 'ask-us', sentence: ASK },
    meaning: ['Every thermometer has an accuracy, and this one cannot settle it in this test.'],
    next: ['We run it longer, or with a finer thermometer.'],
  },
  'too-short': {
    heading: 'This test does not say enough yet.',
    summary: 'It ended before the heat could be judged.',
    tonight: { answer: 'ask-us', sentence: ASK },
    meaning: ['Nothing in it shows a fault. It does not show a sound machine either.'],
    next: ['We run it again, through at least three full rounds of heat.'],
  },
  'in-band': {
    heading: 'The heat stops and starts as it should.',
    summary: 'It stopped by itself where it should, and came back where it should.',
    tonight: {
      answer: 'ask-us',
      sentence:
        'It behaved well, but for too few rounds to call it proven. Ask us before you rely on it.',
    },
    meaning: ['The switch that controls the heat did its work in this test.'],
    next: [
      'Clean the lint screen after every load.',
      'If clothes come out damp, or the machine feels hotter than it did, stop using it and call us.',
    ],
  },
};
