import type { FindingCode } from '../analysis/analysis.ts';
import { isGas, unlessRun, type About, type Cause } from './finding-words.ts';

const READS_COLD: Cause = {
  cause: 'Thermistor open, unplugged or reading cold',
  why: 'The board waits for a temperature that never shows, or shows too late.',
  settles: 'Its resistance at a known temperature against the service sheet, plug out.',
};
const READS_HOT: Cause = {
  cause: 'Thermistor that reads hot',
  why: 'The board stops the heat early, or brings it back late.',
  settles: 'Its resistance at a known temperature against the service sheet, plug out.',
};
const SEAT: Cause = {
  cause: 'Thermistor badly seated, or lint on it',
  why: 'It feels the air late, so the air runs ahead of it.',
  settles: 'Clean and reseat it, and run again.',
};
const SETTING: Cause = {
  cause: 'Another heat setting, or a board set for another model',
  why: 'The board holds a set-point of its own for each setting.',
  settles: 'The setting that was chosen, and the board’s number against the service sheet.',
};
const CONNECTOR: Cause = {
  cause: 'Loose or corroded plug at the thermistor or the board',
  why: 'Resistance that comes and goes moves the temperature that the board sees.',
  settles: 'Look at both plugs, plug out; the thermistor’s ohms while its lead is moved.',
};

/**
 * Likely causes on a machine whose heat a board switches by a thermistor, where they differ from those of a cycling
 * thermostat; likeliest first, common practice. null where the thermostat's causes serve as they are.
 */
export function boardCauses(code: FindingCode, about: About): Cause[] | null {
  const relay = relayCause(about);
  if (code === 'opens-high') return [READS_COLD, SEAT, SETTING];
  if (code === 'opens-low') return [READS_HOT, SETTING];
  if (code === 'closes-high') return [SETTING, CONNECTOR];
  if (code === 'closes-low') return isGas(about) ? [slowFlame(), SETTING] : [SETTING, relay];
  if (code === 'drifting') return [relay, CONNECTOR, airflow()];
  if (code === 'scattered') return [CONNECTOR, relay, probe()];
  return null;
}

/** The same for a runaway in which no cut-out was seen; likeliest first. */
export function boardNeverCutCauses(about: About): Cause[] {
  return [READS_COLD, { ...relayCause(about), why: 'Heat that is fed past the board ignores it.' }];
}

function relayCause(about: About): Cause {
  return {
    cause: isGas(about)
      ? 'Board relay or gas valve that lets go late'
      : 'Heater relay on the board that sticks or lets go late',
    why: 'The board asks for no heat, and heat goes on for a while.',
    settles: 'Relay output when the board calls for none, by a qualified person.',
  };
}

function slowFlame(): Cause {
  return {
    cause: 'Igniter or flame slow to come',
    why: 'The exhaust goes on falling until the flame is there; about 30\u00a0s is usual.',
    settles: 'Mark igniter glow and flame in the next run.',
  };
}

function airflow(): Cause {
  return {
    cause: 'Airflow that changes during the run',
    why: 'Lint that moves, or a blower wheel that slips when warm, changes how far the air runs ahead.',
    settles: 'Air at the outlet at the start and at the end.',
  };
}

function probe(): Cause {
  return {
    cause: 'Probe that moved',
    why: 'The outlet is hotter in the middle than at its edge.',
    settles: 'Fix the probe and run again.',
  };
}

/** The next checks of such a machine, in order; null where those of a thermostat serve as they are. */
export function boardChecks(code: FindingCode, about: About): string[] | null {
  const ohms = 'Thermistor: its ohms at a known temperature against the service sheet, plug out';
  const plugs = 'Plugs of thermistor and board: loose or discoloured, plug out';
  const duct = unlessRun(
    about,
    'off',
    'The same run with the duct off, to tell overshoot from set-point',
  );
  const setting = 'Heat setting: is it the one that is told here?';
  if (code === 'opens-high')
    return [setting, ohms, 'Its seat: in the air stream, no lint on it', ...duct];
  if (code === 'opens-low' || code === 'closes-high') return [setting, ohms, plugs];
  if (code === 'closes-low') return [...(isGas(about) ? [slowFlame().settles] : []), setting, ohms];
  if (code === 'drifting') return ['Next run: mark every click of the relay', plugs, ohms];
  if (code === 'scattered') return [plugs, ohms, 'Probe: fixed in the centre of the outlet?'];
  return null;
}
