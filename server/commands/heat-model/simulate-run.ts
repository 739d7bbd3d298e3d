import type { Random } from './random.ts';
import type { Faults, Machine, Watch } from './machine.ts';
import { createControls, isDoorOpen, type Switch } from './controls.ts';

/** Step of the integration and of `probeC`, s. */
export const STEP_S = 0.1;
const AIR_J_PER_KG_K = 1006;
const VAPOUR_J_PER_KG = 2.4e6;

/** A run as it truly was. */
export type ModelRun = {
  /** The probe without noise, °C, one value each STEP_S from 0. */
  probeC: Float64Array;
  /** The air at the outlet, where the probe is, °C. */
  outletC: Float64Array;
  /** Every change of the heater's power with its cause. */
  switches: Switch[];
  /** When the disc snapped open. */
  clicksS: number[];
  /** When a person turned the heat off; null = never. */
  heatOffS: number | null;
};

/**
 * Heater, drum metal, disc, limit, fuse and probe as first-order nodes in one air stream; air itself holds no heat.
 * Integrated by Euler steps of 0.1 s, a hundredth of the fastest node that matters.
 */
export function simulateRun(
  machine: Machine,
  faults: Faults,
  watch: Watch,
  random: Random,
): ModelRun {
  const controls = createControls(machine, faults, random);
  const nodes = coldNodes(machine);
  const steps = Math.round(watch.forS / STEP_S) + 1;
  const probeC = new Float64Array(steps);
  const outletC = new Float64Array(steps);
  let end = steps;
  let heatOffS: number | null = null;

  for (let i = 0; i < end; i++) {
    const timeS = i * STEP_S;
    probeC[i] = nodes.probeC;
    outletC[i] = nodes.outletC;
    if (heatOffS === null && isTurnedOff(watch, timeS, nodes)) {
      heatOffS = timeS;
      end = Math.min(steps, i + 1 + Math.round(watch.afterHeatOffS / STEP_S));
      controls.turnOff();
    }
    const powerW = controls.powerW(timeS, nodes);
    const airShare = airShareAt(faults, timeS);
    stepNodes(nodes, machine, { powerW, airShare, biasK: controls.biasK() });
  }
  return {
    probeC: probeC.slice(0, end),
    outletC: outletC.slice(0, end),
    switches: controls.switches,
    clicksS: controls.clicksS,
    heatOffS,
  };
}

function isTurnedOff(watch: Watch, timeS: number, { probeC }: Nodes): boolean {
  return probeC >= watch.heatOffAtC || timeS >= (watch.heatOffAtS ?? Infinity);
}

/** Temperatures of the nodes, °C, and the water left, kg. */
export type Nodes = {
  heaterC: number;
  drumC: number;
  outletC: number;
  discC: number;
  boxC: number;
  fuseC: number;
  probeC: number;
  waterKg: number;
};

function coldNodes({ roomC, waterKg }: Machine): Nodes {
  const cold = { heaterC: roomC, drumC: roomC, outletC: roomC, discC: roomC, boxC: roomC };
  return { ...cold, fuseC: roomC, probeC: roomC, waterKg };
}

/** What still moves through a machine at rest: the draught of a warm drum. */
const DRAUGHT_SHARE = 0.08;

function airShareAt(faults: Faults, timeS: number): number {
  if (isDoorOpen(faults, timeS)) return DRAUGHT_SHARE;
  let share = 1;
  for (const step of faults.airflow) if (timeS >= step.fromS) share = step.share;
  return share;
}

function stepNodes(
  nodes: Nodes,
  machine: Machine,
  now: { powerW: number; airShare: number; biasK: number },
): void {
  const { roomC } = machine;
  const dryAirKgPerS = machine.airKgPerS * now.airShare;
  const airWPerK = dryAirKgPerS * AIR_J_PER_KG_K;
  const taken = 1 - Math.exp(-machine.heaterWPerK / airWPerK);
  const toAirW = airWPerK * taken * (nodes.heaterC - roomC);
  const heatedC = roomC + toAirW / airWPerK;

  // Heat passes less well to slower air: the usual power of a turbulent flow, 0.8.
  const left = Math.exp((-machine.drumWPerK * now.airShare ** 0.8) / airWPerK);
  const leavingC = nodes.drumC + (heatedC - nodes.drumC) * left;
  const toDrumW = airWPerK * (heatedC - leavingC);
  const evaporatedKgPerS = evaporation(nodes, dryAirKgPerS);
  const drumW =
    toDrumW - machine.lossWPerK * (nodes.drumC - roomC) - evaporatedKgPerS * VAPOUR_J_PER_KG;
  const mixedC = leavingC + machine.leak * (roomC - leavingC);
  nodes.outletC +=
    ((mixedC - nodes.outletC) / (machine.mixingS / Math.sqrt(now.airShare))) * STEP_S;
  const { outletC } = nodes;

  const drumJPerK = machine.drumJPerK + nodes.waterKg * 4186;
  nodes.heaterC += ((now.powerW - toAirW) / machine.heaterJPerK) * STEP_S;
  nodes.drumC += (drumW / drumJPerK) * STEP_S;
  nodes.waterKg -= evaporatedKgPerS * STEP_S;
  nodes.discC += ((outletC + now.biasK - nodes.discC) / machine.disc.lagS) * STEP_S;
  // The limit sits on the housing: it feels the heated air and some glow of the coil.
  nodes.boxC +=
    ((0.85 * heatedC + 0.15 * nodes.heaterC - nodes.boxC) / machine.boxLimit.lagS) * STEP_S;
  nodes.fuseC += ((outletC - nodes.fuseC) / machine.fuse.lagS) * STEP_S;
  nodes.probeC += ((outletC - nodes.probeC) / machine.probeLagS) * STEP_S;
}

/** Water leaves with air that nearly saturates at the load's temperature; it slows as the cloth dries. */
function evaporation({ drumC, waterKg }: Nodes, dryAirKgPerS: number): number {
  if (waterKg <= 0) return 0;
  const saturated = Math.max(0, humidityRatio(drumC) - humidityRatio(12));
  return dryAirKgPerS * 0.7 * saturated * Math.min(1, waterKg / 0.6);
}

/** kg of water to kg of dry air at saturation; Magnus formula for the vapour pressure over water. */
function humidityRatio(tempC: number): number {
  const pressureHPa = 6.112 * Math.exp((17.62 * tempC) / (243.12 + tempC));
  return (0.622 * pressureHPa) / (1013.25 - Math.min(pressureHPa, 900));
}
