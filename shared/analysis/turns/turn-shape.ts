/**
 * The shape of one turn, for records with so many that fitting all of them together would take too long: legs and lags
 * are known from a joint fit of some, so a turn is a sum of five known curves of the time since the switch.
 *
 * Before the switch the unlagged exhaust is `a0 + a1·s + a2·exp(−s/τ)`, after it `b0 + b1·s + b2·exp(−s/τ')`, the two
 * meeting at s = 0. Lags pass sums through, so each of the five free coefficients has its own lagged curve.
 */
export type TurnShape = {
  /** First time of the table after the switch, s (negative), and its step. */
  fromS: number;
  stepS: number;
  /** Rows of CURVES values: a0, a1, a2, b1, b2. */
  table: Float64Array;
  rows: number;
};

/** Number of curves. */
export const CURVES = 5;

export type ShapeConstants = {
  tauBeforeS: number;
  tauAfterS: number;
  lagAS: number;
  lagBS: number;
};

/**
 * Tabulates the five curves.
 *
 * @param beforeS how far before the switch the table reaches, s
 * @param afterS how far after it, s
 */
export function tabulateTurn(
  constants: ShapeConstants,
  beforeS: number,
  afterS: number,
): TurnShape {
  const stepS = (constants.lagAS + constants.lagBS) / 40;
  const rows = Math.ceil((beforeS + afterS) / stepS) + 3;
  const table = new Float64Array(rows * CURVES);
  const fromS = -beforeS - stepS;
  for (let row = 0; row < rows; row++) fillRow(table, row * CURVES, fromS + row * stepS, constants);
  return { fromS, stepS, table, rows };
}

function fillRow(
  table: Float64Array,
  at: number,
  sinceS: number,
  { tauBeforeS, tauAfterS, lagAS, lagBS }: ShapeConstants,
): void {
  const before =
    lagged(tauBeforeS, lagAS) * lagged(tauBeforeS, lagBS) * Math.exp(-sinceS / tauBeforeS);
  const after = sinceS > 0;
  const ramp = after ? rampResponse(sinceS, lagAS, lagBS) : 0;
  table[at] = 1;
  table[at + 1] = sinceS - lagAS - lagBS - ramp;
  table[at + 2] = before + (after ? riseResponse(sinceS, tauBeforeS, lagAS, lagBS) : 0);
  table[at + 3] = ramp;
  table[at + 4] = after ? -riseResponse(sinceS, tauAfterS, lagAS, lagBS) : 0;
}

/** How much an exponential grows in passing a lag. */
function lagged(tauS: number, lagS: number): number {
  return tauS / (tauS - lagS);
}

/** Two lags' answer to a ramp that starts at 0. */
function rampResponse(sinceS: number, lagAS: number, lagBS: number): number {
  const a = Math.exp(-sinceS / lagAS);
  const b = Math.exp(-sinceS / lagBS);
  return sinceS - lagAS - lagBS + (lagAS * lagAS * a - lagBS * lagBS * b) / (lagAS - lagBS);
}

/** Two lags' answer to `1 − exp(−s/τ)` from 0: partial fractions of 1/((1 + τs)(1 + as)(1 + bs)s). */
function riseResponse(sinceS: number, tauS: number, lagAS: number, lagBS: number): number {
  const part = (own: number, one: number, two: number) =>
    ((own * own) / ((own - one) * (own - two))) * Math.exp(-sinceS / own);
  return 1 - part(tauS, lagAS, lagBS) - part(lagAS, tauS, lagBS) - part(lagBS, tauS, lagAS);
}
