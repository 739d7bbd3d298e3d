import type { Noise } from '../estimate-noise.ts';
import { median } from '../statistics/quantile.ts';
import { fitPlant, type FittedPlant } from './fit-plant.ts';
import { widening } from './misfit.ts';
import type { FitWindow } from './plan-windows.ts';
import type { PlantProblem } from './plant-system.ts';
import type { WindowValues } from './gather-values.ts';
import type { RoughTurn } from './locate-turns.ts';
import {
  LN_LAG,
  LN_QUICK,
  LN_SLOW_OVER_QUICK,
  LOGIT_SECOND,
  LOGIT_THIRD,
  MODES,
  parameterCount,
  placeOfLevel,
  placeOfStart,
  placeOfSwitch,
  SHARE_QUICK,
  SHARE_SLOW,
  type PlantShape,
} from './switched-plant.ts';

/** Where a fit starts: the longest lag, s, the switch times if another fit has found them, and which stores. */
export type PlantStart = {
  lagS: number;
  switchesS: Float64Array | null;
  stores: Stores;
  lags: Lags;
};

/** Logits of the second lag over the first and the third over the second. */
type Lags = { second: number; third: number };

/** Three lags of one order: heater, outlet, probe; or one far longer than the others. */
const THREE_LAGS: Lags = { second: -0.7, third: -1 };
const ONE_LAG: Lags = { second: -2.5, third: -1 };

/** The quick store's τ over a usual leg, the slow one's over that, and the shares of both. */
type Stores = { quick: number; slowOverQuick: number; quickShare: number; slowShare: number };

/** Most of the heat goes through one store of the drum … */
const ONE_STORE: Stores = { quick: 1.8, slowOverQuick: 4, quickShare: 0.7, slowShare: 0.2 };
/** … or a little through a quick one and most through a slow one. */
const TWO_STORES: Stores = { quick: 0.15, slowOverQuick: 12, quickShare: 0.3, slowShare: 0.65 };
/** … or all of it through one, none straight on. */
const NO_SHORT_CUT: Stores = { quick: 2.5, slowOverQuick: 4, quickShare: 1, slowShare: 0 };
/** How far off the time constants may be, in e-folds, and the shares. */
const TIME_LOOSENESS = 1;
const SLOW_LOOSENESS = 0.8;
const QUICK_LOOSENESS = 0.4;
const SLOW_SHARE_LOOSENESS = 0.3;
/** How far off these may be. */
const LOGIT_LOOSENESS = 2;
/** Levels and starts are known to within so many swings. */
const LEVEL_SWINGS = 20;
/** Like legs' levels differ by this share of the levels' distance, before the readings tell. */
const LEVEL_SHARE = 0.02;
/** An honest reading of the kinds known here scatters by about this much, K, where too few are left over to tell. */
const USUAL_NOISE_K = 0.1;
/** A turn comes so many lags after its switch. */
const TURN_AFTER = 0.8;
/** A fit needs so many values a turn, each with a time of its own, and so many more for what all share. */
const VALUES_A_TURN = 1.3;
const LEAST_SPARE = 10;
/** With fewer values a leg than this a fit is tried from other lags too, as shares of a usual leg. */
const FEW_VALUES = 15;
const OTHER_LAGS = [0.06, 0.2];
/** Residuals that widen errors by more than this show that the stores were mistaken. */
const MISFIT = 1.3;
/** A fit this much less likely than the best, in twice the log, is left out. */
const MOST_BEHIND = 12;

/** Fits of one window that the readings do not tell apart, with their probabilities. */
export type WeighedPlants = { fit: FittedPlant; share: number }[];

/**
 * Fits a window's turns as a switched plant, from where a simpler fit ended; where values are few from other lags too,
 * and where the residuals follow each other from other stores too. Each fit is weighed by its evidence in Laplace's
 * approximation (the posterior's height times its width), so that what few readings leave open stays open.
 *
 * @param from of the simpler fit; null where there is none
 * @returns empty where no fit holds
 */
export function fitTurns(
  values: WindowValues,
  turns: RoughTurn[],
  window: FitWindow,
  noise: Noise,
  from: Pick<PlantStart, 'lagS' | 'switchesS'> | null,
): WeighedPlants {
  const count = values.timesS.length;
  if (count < VALUES_A_TURN * turns.length + LEAST_SPARE) return [];
  const isSparse = count < FEW_VALUES * (turns.length + 1);
  const fitFrom = (start: PlantStart) =>
    fitPlant(plantProblem(values, turns, window, noise, start));
  const fits: (FittedPlant | null)[] = [];
  if (from) fits.push(fitFrom({ ...from, stores: ONE_STORE, lags: THREE_LAGS }));
  const first = fits[0];
  if (!from || isSparse) {
    const usualS = usualLeg(turns, window);
    for (const share of OTHER_LAGS) {
      const start = { lagS: share * usualS, switchesS: null };
      fits.push(fitFrom({ ...start, stores: ONE_STORE, lags: THREE_LAGS }));
      fits.push(fitFrom({ ...start, stores: NO_SHORT_CUT, lags: ONE_LAG }));
    }
  } else if (first && widening(first, values.timesS) > MISFIT) {
    fits.push(fitFrom({ ...from, stores: TWO_STORES, lags: ONE_LAG }));
  }
  return weighed(fits.filter((fit) => fit !== null));
}

function weighed(fits: FittedPlant[]): WeighedPlants {
  const least = Math.min(...fits.map(({ evidence }) => evidence));
  const near = fits.filter(({ evidence }) => evidence - least < MOST_BEHIND);
  const sum = near.reduce((all, { evidence }) => all + Math.exp((least - evidence) / 2), 0);
  return near.map((fit) => ({ fit, share: Math.exp((least - fit.evidence) / 2) / sum }));
}

function usualLeg(turns: RoughTurn[], { startS, endS }: FitWindow): number {
  const cuts = [startS, ...turns.map(({ timeS }) => timeS), endS];
  return median(cuts.slice(1).map((cut, i) => cut - cuts[i]!));
}

/** What is believed before the fit; times scale with a usual leg, temperatures with the greatest swing. */
export function plantProblem(
  values: WindowValues,
  turns: RoughTurn[],
  window: FitWindow,
  { noiseK, roundingK }: Noise,
  from: PlantStart,
): PlantProblem {
  const { timesS, tempsC, weights, averaged } = values;
  const shape: PlantShape = {
    switches: turns.length,
    startS: window.startS,
    endS: window.endS,
  };
  const start = new Float64Array(parameterCount(shape));
  const looseness = new Float64Array(start.length);
  const believe = (place: number, value: number, loose: number) => {
    start[place] = value;
    looseness[place] = loose;
  };
  const usualS = usualLeg(turns, window);
  const { stores } = from;
  believe(LN_QUICK, Math.log(stores.quick * usualS), TIME_LOOSENESS);
  believe(LN_SLOW_OVER_QUICK, Math.log(stores.slowOverQuick), SLOW_LOOSENESS);
  believe(LN_LAG, Math.log(from.lagS), TIME_LOOSENESS);
  believe(LOGIT_SECOND, from.lags.second, LOGIT_LOOSENESS);
  believe(LOGIT_THIRD, from.lags.third, LOGIT_LOOSENESS);
  believe(SHARE_QUICK, stores.quickShare, QUICK_LOOSENESS);
  believe(SHARE_SLOW, stores.slowShare, SLOW_SHARE_LOOSENESS);
  turns.forEach(({ timeS }, k) => {
    const beforeS = turns[k - 1]?.timeS ?? window.startS;
    const roughS = Math.max(timeS - TURN_AFTER * from.lagS, beforeS + 0.3 * (timeS - beforeS));
    believe(placeOfSwitch(k), from.switchesS?.[k] ?? roughS, 2 * usualS);
  });
  believeLevels(shape, values, turns, noiseK, believe);
  const scale = 1 / Math.sqrt(averaged);
  const stepK = roundingK / Math.sqrt(12);
  const leastNoiseK = Math.max(0.1 * noiseK * scale, 0.7 * stepK * scale, 1e-3);
  const believedNoiseK = Math.min(noiseK, Math.hypot(stepK, USUAL_NOISE_K)) * scale;
  return {
    shape,
    timesS,
    tempsC,
    weights,
    start,
    looseness,
    levelShare: LEVEL_SHARE,
    leastNoiseK,
    believedNoiseK: Math.max(leastNoiseK, believedNoiseK),
  };
}

/** The first level of each kind is loose, the others follow theirs (see fitPlant); the lags have forgotten the start. */
function believeLevels(
  shape: PlantShape,
  { tempsC }: WindowValues,
  turns: RoughTurn[],
  noiseK: number,
  believe: (place: number, value: number, loose: number) => void,
): void {
  const nodes = [tempsC[0]!, ...turns.map(({ tempC }) => tempC), tempsC[tempsC.length - 1]!];
  const swingsK = nodes.slice(1).map((node, i) => Math.abs(node - nodes[i]!));
  const greatK = Math.max(...swingsK, 10 * noiseK, 0.01);
  const heatsFirst = turns[0]!.kind === 'peak';
  const middleC = median(nodes);
  for (let leg = 0; leg <= shape.switches; leg++) {
    const heats = (leg % 2 === 0) === heatsFirst;
    const levelC = middleC + (heats ? 2 : -2) * greatK;
    believe(placeOfLevel(shape, leg), levelC, LEVEL_SWINGS * greatK);
  }
  for (let mode = 0; mode < MODES; mode++) {
    const isStore = mode < 2;
    const startK = isStore ? (heatsFirst ? -2 : 2) * greatK : 0;
    believe(placeOfStart(shape, mode), startK, (isStore ? LEVEL_SWINGS : 1) * greatK);
  }
}
