import { useEffect } from 'react';
import type { GuardSays } from '#shared/analysis/guard/guard-state.ts';
import { beatAt, type Rhythm } from '#shared/recorder/rhythm.ts';
import type { Preferences } from './preferences.ts';
import { vibrate, VIBRATIONS, type Sounds } from './sounds.ts';

const WATCH_EVERY_MS = 15_000;
const CUT_HEAT_EVERY_MS = 750;

/** The guard's sound and touch, for as long as it says so. */
export function useAlarm(says: GuardSays, sounds: Sounds, { hasSound, hasVibration }: Preferences) {
  useEffect(() => {
    if (says === 'quiet') return;
    const isWatch = says === 'watch';
    const call = () => {
      if (hasSound) (isWatch ? sounds.watch : sounds.cutHeat)();
      if (hasVibration) vibrate(isWatch ? VIBRATIONS.watch : VIBRATIONS.cutHeat);
    };
    call();
    const timer = setInterval(call, isWatch ? WATCH_EVERY_MS : CUT_HEAT_EVERY_MS);
    return () => {
      clearInterval(timer);
      if (hasVibration) vibrate([0]);
    };
  }, [says, sounds, hasSound, hasVibration]);
}

/** A soft tick and a pulse when a reading is due. */
export function useBeat(nowS: number, rhythm: Rhythm, sounds: Sounds, preferences: Preferences) {
  const { hasTick, hasSound, hasVibration } = preferences;
  const ticks = rhythm === null ? 0 : beatAt(rhythm, nowS).ticks;
  useEffect(() => {
    if (ticks === 0) return;
    if (hasTick && hasSound) sounds.beat();
    if (hasVibration) vibrate(VIBRATIONS.beat);
  }, [ticks, hasTick, hasSound, hasVibration, sounds]);
}
