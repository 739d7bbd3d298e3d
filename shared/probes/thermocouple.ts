import { polynomial, polynomialSlope } from './polynomial.ts';
import { solveRising } from './solve-rising.ts';
import { THERMOCOUPLES, type EmfPiece, type ThermocoupleType } from './thermocouple-functions.ts';

/**
 * Voltage of a thermocouple whose terminals are at 0 °C, mV.
 *
 * @param tempC junction, °C: K −270 to 1372, J −210 to 760, T −270 to 400
 * @throws {RangeError} outside the reference function's range, or not finite
 */
export function thermocoupleEmf(type: ThermocoupleType, tempC: number): number {
  return emfAt(pieceFor(type, tempC), tempC).value;
}

/**
 * Temperature of the junction from the voltage against terminals at 0 °C, °C: the reference function turned round
 * by Newton's rule from the published inverse polynomial, so that a round trip closes to 1e-9 °C where the
 * polynomial alone leaves 0.05.
 *
 * @throws {RangeError} no temperature of the reference function gives that voltage
 */
export function thermocoupleTemp(type: ThermocoupleType, emfMV: number): number {
  const { pieces, inverse } = THERMOCOUPLES[type];
  const low = pieces[0]!.fromC;
  const high = pieces.at(-1)!.toC;
  const lowestMV = thermocoupleEmf(type, low);
  const highestMV = thermocoupleEmf(type, high);
  if (!(emfMV >= lowestMV && emfMV <= highestMV)) {
    throw new RangeError(`type ${type} gives ${lowestMV} to ${highestMV} mV, not ${emfMV}`);
  }
  const held = Math.min(inverse.toMV, Math.max(inverse.fromMV, emfMV));
  const perMV = inverse.coefficients[1]!;
  const guess = polynomial(inverse.coefficients, held) + (emfMV - held) * perMV;
  return solveRising((tempC) => emfAt(pieceFor(type, tempC), tempC), emfMV, { low, high, guess });
}

/**
 * Temperature of the junction where the terminals are not at 0 °C, °C. Voltages are added, never temperatures: the
 * function is not a straight line.
 *
 * @param emfMV as measured at the terminals
 * @param terminalC of the terminals, °C
 * @throws {RangeError} see thermocoupleTemp
 */
export function thermocoupleTempWithTerminals(
  type: ThermocoupleType,
  emfMV: number,
  terminalC: number,
): number {
  return thermocoupleTemp(type, emfMV + thermocoupleEmf(type, terminalC));
}

function pieceFor(type: ThermocoupleType, tempC: number): EmfPiece {
  const { pieces } = THERMOCOUPLES[type];
  const piece = pieces.find(({ fromC, toC }) => tempC >= fromC && tempC <= toC);
  if (!piece) {
    const reach = `${pieces[0]!.fromC} to ${pieces.at(-1)!.toC}`;
    throw new RangeError(`type ${type} is defined from ${reach} °C, not at ${tempC}`);
  }
  // At 0 °C both pieces meet: the warm one is the usual side.
  return tempC === 0 ? pieces.at(-1)! : piece;
}

function emfAt({ coefficients, exponential }: EmfPiece, tempC: number) {
  const value = polynomial(coefficients, tempC);
  const slope = polynomialSlope(coefficients, tempC);
  if (!exponential) return { value, slope };
  const [a0, a1, a2] = exponential;
  const hump = a0 * Math.exp(a1 * (tempC - a2) ** 2);
  return { value: value + hump, slope: slope + hump * 2 * a1 * (tempC - a2) };
}
