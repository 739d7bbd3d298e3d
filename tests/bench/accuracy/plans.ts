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

/** Every run of a seed, or those whose name holds a word: the same ones each time, whatever plans stand beside them. */
export function plansOf(seed: number, named = ''): Plan[] {
  return MAKERS.flatMap((maker, i) => {
    if (!maker.name.includes(named)) return [];
    const alike = MAKERS.slice(0, i).filter(({ name }) => name === maker.name).length;
    return [fillPlan(maker, createRandom(seed * 65536 + numberOf(maker.name) + alike))];
  });
}

/** A name as a number under 65536: its letters folded together. */
function numberOf(name: string): number {
  let folded = 0;
  for (const letter of name) folded = (folded * 31 + letter.charCodeAt(0)) % 65521;
  return folded;
}
