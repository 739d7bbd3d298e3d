import { toRhythm, type Rhythm } from '#shared/recorder/rhythm.ts';

/** How this person likes the stopwatch on this device. */
export type Preferences = {
  rhythm: Rhythm;
  hasSound: boolean;
  /** The soft tick that asks for a reading. */
  hasTick: boolean;
  hasVibration: boolean;
  hand: 'right' | 'left';
  unit: 'F' | 'C' | null;
  hasTenths: boolean;
  /** Figures and letters of a keyboard work anywhere on the page (WCAG 2.2, 2.1.4: they can be turned off). */
  hasKeyboard: boolean;
};

const AT_FIRST: Preferences = {
  rhythm: 10,
  hasSound: true,
  hasTick: false,
  hasVibration: true,
  hand: 'right',
  unit: null,
  hasTenths: false,
  hasKeyboard: true,
};
const PLACE = 'fusekeeper-stopwatch';

export function loadPreferences(): Preferences {
  try {
    const kept: unknown = JSON.parse(localStorage.getItem(PLACE) ?? '{}');
    return typeof kept === 'object' && kept !== null
      ? understood(new Map(Object.entries(kept)))
      : AT_FIRST;
  } catch {
    // Storage can be closed to a page, or hold something else: what everybody starts with will do.
    return AT_FIRST;
  }
}

function understood(kept: Map<string, unknown>): Preferences {
  const yes = (name: keyof Preferences, otherwise: boolean) => {
    const value = kept.get(name);
    return typeof value === 'boolean' ? value : otherwise;
  };
  const rhythm = toRhythm(kept.get('rhythm'));
  const unit = kept.get('unit');
  return {
    rhythm: rhythm === undefined ? AT_FIRST.rhythm : rhythm,
    hasSound: yes('hasSound', AT_FIRST.hasSound),
    hasTick: yes('hasTick', AT_FIRST.hasTick),
    hasVibration: yes('hasVibration', AT_FIRST.hasVibration),
    hand: kept.get('hand') === 'left' ? 'left' : 'right',
    unit: unit === 'F' || unit === 'C' ? unit : null,
    hasTenths: yes('hasTenths', AT_FIRST.hasTenths),
    hasKeyboard: yes('hasKeyboard', AT_FIRST.hasKeyboard),
  };
}

export function keepPreferences(preferences: Preferences): void {
  try {
    localStorage.setItem(PLACE, JSON.stringify(preferences));
  } catch {
    // Then they last as long as the page.
  }
}
