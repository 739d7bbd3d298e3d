import type { Series } from '#shared/analysis/series.ts';

/** One leg: the exhaust heads for an asymptote with a time constant until it reaches `untilC`. */
export type BuiltLeg = { asymptoteC: number; tauS: number; untilC: number };

export type BuildOptions = {
  startC: number;
  legs: BuiltLeg[];
  /** First-order lag of the probe behind the exhaust, s. */
  lagS: number;
  spacingS: number;
  /** Standard deviation of a reading, K. */
  noiseK?: number;
  /** Step that readings are rounded to, K; 0 = not rounded. */
  roundingK?: number;
  seed?: number;
};

/** A turn of the noise-free probe, known in closed form. */
export type BuiltTurn = {
  kind: 'peak' | 'valley';
  timeS: number;
  tempC: number;
  switchTimeS: number;
};

type Piece = {
  fromS: number;
  toS: number;
  asymptoteC: number;
  tauS: number;
  /** Coefficients of exp(−s/τ) and exp(−s/lag) in the probe's temperature. */
  slow: number;
  quick: number;
};

/**
 * A seeded series of first-order legs seen through one first-order lag. Probe and truth are closed forms: on a leg the
 * exhaust is `A + B·e^(−s/τ)`, the probe `A + B·g·e^(−s/τ) + C·e^(−s/lag)` with `g = τ/(τ − lag)`.
 */
export function buildSeries(options: BuildOptions): { series: Series; turns: BuiltTurn[] } {
  const { lagS, spacingS, noiseK = 0, roundingK = 0, seed = 1 } = options;
  const pieces = toPieces(options);
  const random = seededNormal(seed);
  const endS = pieces.at(-1)!.toS;
  const count = Math.floor(endS / spacingS + 1e-9) + 1;
  const timesS = new Float64Array(count);
  const tempsC = new Float64Array(count);
  let at = 0;
  for (let i = 0; i < count; i++) {
    const timeS = i * spacingS;
    while (at < pieces.length - 1 && timeS >= pieces[at]!.toS) at++;
    const tempC = probeAt(pieces[at]!, timeS, lagS) + noiseK * random();
    timesS[i] = timeS;
    tempsC[i] = roundingK > 0 ? Math.round(tempC / roundingK) * roundingK : tempC;
  }
  const turns = pieces.slice(1).map((piece) => turnOf(piece, lagS));
  return { series: { timesS, tempsC }, turns: turns.filter((turn) => turn !== null) };
}

/** Legs of a sound thermostat: from cold, then `cycles` times down and up; a last fall so that all turns are whole. */
export function thermostatLegs({
  opensC = 68,
  closesC = 55,
  cycles = 5,
}: { opensC?: number; closesC?: number; cycles?: number } = {}): BuiltLeg[] {
  const heat = { asymptoteC: 92, tauS: 120, untilC: opensC };
  const cool = { asymptoteC: 25, tauS: 110, untilC: closesC };
  const legs = [{ ...heat, tauS: 220 }];
  for (let i = 0; i < cycles; i++) legs.push(cool, heat);
  return [...legs, { ...cool, untilC: closesC + 2 }];
}

/** The whole of it on a plain 1 s probe. */
export function buildThermostatRun(options: Partial<BuildOptions> & { cycles?: number } = {}) {
  const { cycles = 5, ...rest } = options;
  const legs = thermostatLegs({ cycles });
  return buildSeries({ startC: 22, legs, lagS: 6, spacingS: 1, ...rest });
}

function toPieces({ startC, legs, lagS }: BuildOptions): Piece[] {
  let fromS = 0;
  let fromC = startC;
  let probeC = startC;
  return legs.map(({ asymptoteC, tauS, untilC }) => {
    const lengthS = tauS * Math.log((asymptoteC - fromC) / (asymptoteC - untilC));
    if (!(lengthS > 0)) throw new RangeError(`a leg to ${asymptoteC} never reaches ${untilC}`);
    const slow = ((fromC - asymptoteC) * tauS) / (tauS - lagS);
    const quick = probeC - asymptoteC - slow;
    const piece = { fromS, toS: fromS + lengthS, asymptoteC, tauS, slow, quick };
    probeC = probeAt(piece, piece.toS, lagS);
    fromS = piece.toS;
    fromC = untilC;
    return piece;
  });
}

function probeAt({ fromS, asymptoteC, tauS, slow, quick }: Piece, timeS: number, lagS: number) {
  const sinceS = timeS - fromS;
  return asymptoteC + slow * Math.exp(-sinceS / tauS) + quick * Math.exp(-sinceS / lagS);
}

/** Where the probe's slope is zero after a switch: `slow/τ·e^(−s/τ) = −quick/lag·e^(−s/lag)`. */
function turnOf(piece: Piece, lagS: number): BuiltTurn | null {
  const { fromS, toS, tauS, slow, quick } = piece;
  const ratio = (-quick * tauS) / (slow * lagS);
  const timeS = fromS + Math.log(ratio) / (1 / lagS - 1 / tauS);
  if (!(ratio > 0) || timeS > toS) return null;
  const kind = slow > 0 ? 'peak' : 'valley';
  return { kind, timeS, tempC: probeAt(piece, timeS, lagS), switchTimeS: fromS };
}

/** Normal numbers from a 32-bit linear congruential generator (Numerical Recipes' constants) by Box and Muller. */
export function seededNormal(seed: number): () => number {
  let state = seed >>> 0;
  const next = () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return (state + 0.5) / 4294967296;
  };
  for (let i = 0; i < 8; i++) next();
  return () => Math.sqrt(-2 * Math.log(next())) * Math.cos(2 * Math.PI * next());
}
