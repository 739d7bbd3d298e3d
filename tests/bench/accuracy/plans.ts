import { createRandom } from '#server/commands/heat-model/random.ts';
import { fillPlan, type Maker, type Plan } from './plan.ts';
import { HEAT_LEFT_PLANS } from './plans/heat-left-plans.ts';
import { LIMIT_PLANS } from './plans/limit-plans.ts';
import { LITTLE_HEAT_PLANS } from './plans/little-heat-plans.ts';
import { RUNAWAY_PLANS } from './plans/runaway-plans.ts';
import { SOUND_PLANS } from './plans/sound-plans.ts';
import { THERMOSTAT_PLANS } from './plans/thermostat-plans.ts';

const MAKERS: Maker[] = [
  ...SOUND_PLANS,
  ...THERMOSTAT_PLANS,
  ...RUNAWAY_PLANS,
  ...HEAT_LEFT_PLANS,
  ...LIMIT_PLANS,
  ...LITTLE_HEAT_PLANS,
];

/** Every run of a seed, or those whose name holds a word: the same ones each time. */
export function plansOf(seed: number, named = ''): Plan[] {
  return MAKERS.flatMap((maker, i) =>
    maker.name.includes(named) ? [fillPlan(maker, createRandom(seed * 1000 + i))] : [],
  );
}
