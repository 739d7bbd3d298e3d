export const SPARK_POINTS = 66;

/** At most SPARK_POINTS [s, °C] pairs for a small chart: each stretch gives its lowest and its highest reading, in order. */
export function sparkPoints(timesS: Float64Array, tempsC: Float64Array): [number, number][] {
  const n = timesS.length;
  if (n <= SPARK_POINTS) return Array.from(timesS, (timeS, i) => [timeS, tempsC[i]!]);

  const stretches = SPARK_POINTS / 2;
  const points: [number, number][] = [];
  for (let k = 0; k < stretches; k++) {
    const from = Math.floor((k * n) / stretches);
    const to = Math.floor(((k + 1) * n) / stretches);
    for (const i of extremes(tempsC, from, to)) points.push([timesS[i]!, tempsC[i]!]);
  }
  return points;
}

function extremes(tempsC: Float64Array, from: number, to: number): number[] {
  let lowest = from;
  let highest = from;
  for (let i = from; i < to; i++) {
    if (tempsC[i]! < tempsC[lowest]!) lowest = i;
    if (tempsC[i]! > tempsC[highest]!) highest = i;
  }
  return lowest === highest ? [lowest] : [Math.min(lowest, highest), Math.max(lowest, highest)];
}
