/** A snap disc that opens on heat and closes again; it lags behind the air it watches. */
export type Disc = { opensC: number; closesC: number; lagS: number };

/** A dryer as the model knows it. Figures are of the usual size for a household machine, not of any maker. */
export type Machine = {
  powerW: number;
  /** From the call for heat to the heat: a gas igniter warms up for about 30 s (common practice). */
  relightS: number;
  roomC: number;
  airKgPerS: number;
  /** Share of room air that leaks in between drum and outlet. */
  leak: number;
  heaterJPerK: number;
  heaterWPerK: number;
  drumJPerK: number;
  drumWPerK: number;
  lossWPerK: number;
  /** Water in the load at the start; 0 = empty drum. */
  waterKg: number;
  /** The cycling thermostat, in the exhaust. */
  disc: Disc;
  /** The self-resetting limit on the heater housing. */
  boxLimit: Disc;
  /** The one-shot fuse in the exhaust; once open it stays open. */
  fuse: { opensC: number; lagS: number };
  /** Mixing in chute, blower and outlet: how far the outlet's air lags behind the drum's, s at full air. */
  mixingS: number;
  /** First-order lag of the probe in moving air. */
  probeLagS: number;
  /** How much a bias heater warms the disc while heat is on, K: it opens that much lower; 0 = none. */
  biasK: number;
};

/** What is wrong. A sound machine has SOUND. */
export type Faults = {
  /** Share of the normal air from a time on: a crushed duct, or a duct taken off half-way. */
  airflow: { fromS: number; share: number }[];
  /** Share of the rated power that a weak, half or open heater gives. */
  heaterShare: number;
  /** Openings of the disc that the heater relay obeys; from the next on it sticks. */
  relaySticksAfter: number;
  /** Seconds that the relay opens later with each cycle. */
  relayLateS: number;
  /** Heat that a coil touching its box gives whatever the disc says, once hot … */
  groundedW: number;
  /** … after this many openings. */
  groundedAfter: number;
  /** The disc's opening point moves by this much with each cycle … */
  driftK: number;
  /** … and scatters by this standard deviation. */
  scatterK: number;
  /** One opening, counted from 1, that comes this much late. */
  oneLate: { opening: number; byK: number } | null;
  /** Something one-shot opens at this time, whatever its temperature; Infinity = never. */
  opensForGoodS: number;
  /** Spans in which the door stands open: no heat, and the motor with its blower stands still. */
  doorOpen: { fromS: number; toS: number }[];
};

export const SOUND: Faults = {
  airflow: [],
  heaterShare: 1,
  relaySticksAfter: Infinity,
  relayLateS: 0,
  groundedW: 0,
  groundedAfter: Infinity,
  driftK: 0,
  scatterK: 0,
  oneLate: null,
  opensForGoodS: Infinity,
  doorOpen: [],
};

export const ELECTRIC: Machine = {
  powerW: 5600,
  relightS: 0,
  roomC: 22,
  airKgPerS: 0.07,
  leak: 0.1,
  heaterJPerK: 420,
  heaterWPerK: 46,
  drumJPerK: 16000,
  drumWPerK: 105,
  lossWPerK: 5,
  waterKg: 0,
  disc: { opensC: 67.9, closesC: 55, lagS: 6 },
  boxLimit: { opensC: 123, closesC: 96, lagS: 8 },
  fuse: { opensC: 91.1, lagS: 40 },
  mixingS: 4,
  probeLagS: 3,
  biasK: 0,
};

export const GAS: Machine = {
  ...ELECTRIC,
  powerW: 5860,
  relightS: 30,
  heaterJPerK: 260,
  disc: { opensC: 67.6, closesC: 57.2, lagS: 6 },
};

/** How long somebody watches, and what they do. */
export type Watch = {
  forS: number;
  /** The probe reading at which heat is turned off by hand; Infinity = never. */
  heatOffAtC: number;
  /** The time at which heat is turned off by hand whatever the reading; left out = never. */
  heatOffAtS?: number;
  /** How long the record goes on after heat was turned off. */
  afterHeatOffS: number;
};
