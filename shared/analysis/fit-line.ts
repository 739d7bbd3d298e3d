export type LineFit = {
  /** Temperature at time 0, °C. */
  interceptC: number;
  /** Standard error (k = 1) of the intercept, K. */
  interceptErrorK: number;
  slopeCPerS: number;
  /** Standard error (k = 1) of the slope. */
  slopeErrorCPerS: number;
  /** Residual standard deviation with n − 2 degrees of freedom, K. */
  residualSdC: number;
  /** Mean time, s, and temperature there: the errors of the two are independent. */
  meanS: number;
  meanC: number;
};

/**
 * Ordinary least-squares line through part of a temperature trace.
 *
 * Both variables are centred before summing: with epoch times (about 1.8e9 s) the textbook sums of
 * squares cancel and the slope loses most of its digits.
 *
 * @param timesS sample times in s, any spacing, same length as tempsC, n >= 3
 * @param tempsC temperatures in °C
 * @throws {RangeError} lengths differ, n < 3, a value is not finite, or all times are equal
 * @see https://www.itl.nist.gov/div898/strd/lls/data/Norris.shtml certified test case
 */
export function fitLine(timesS: ArrayLike<number>, tempsC: ArrayLike<number>): LineFit {
  const n = timesS.length;
  if (tempsC.length !== n) throw new RangeError(`${n} times but ${tempsC.length} temperatures`);
  if (n < 3) throw new RangeError(`a line fit needs 3 samples, got ${n}`);

  const meanS = mean(timesS);
  const meanC = mean(tempsC);
  let sxx = 0;
  let sxy = 0;
  for (let i = 0; i < n; i++) {
    const dx = timesS[i]! - meanS;
    sxx += dx * dx;
    sxy += dx * (tempsC[i]! - meanC);
  }
  if (!Number.isFinite(sxx + sxy)) throw new RangeError('times and temperatures must be finite');
  if (sxx === 0) throw new RangeError('all times are equal');

  const slopeCPerS = sxy / sxx;
  let squares = 0;
  for (let i = 0; i < n; i++) {
    squares += (tempsC[i]! - meanC - slopeCPerS * (timesS[i]! - meanS)) ** 2;
  }
  const residualSdC = Math.sqrt(squares / (n - 2));
  return {
    interceptC: meanC - slopeCPerS * meanS,
    interceptErrorK: residualSdC * Math.sqrt(1 / n + (meanS * meanS) / sxx),
    slopeCPerS,
    slopeErrorCPerS: residualSdC / Math.sqrt(sxx),
    residualSdC,
    meanS,
    meanC,
  };
}

function mean(values: ArrayLike<number>): number {
  let sum = 0;
  for (let i = 0; i < values.length; i++) sum += values[i]!;
  return sum / values.length;
}
