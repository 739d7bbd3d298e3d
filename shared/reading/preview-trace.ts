/** [s, lowest, highest] of one column of a small trace. */
export type TraceColumn = [timeS: number, lowest: number, highest: number];

/**
 * A series in at most `columns` columns of equal time, each with its lowest and highest reading, so
 * that no peak is ever lost. A column without readings is left out: that is a gap.
 *
 * @param timesS s, strictly rising
 * @param temps any unit, same length
 * @returns the time of a column is that of its first reading
 */
export function traceColumns(
  timesS: Float64Array,
  temps: Float64Array,
  columns: number,
): TraceColumn[] {
  const n = Math.min(timesS.length, temps.length);
  if (n <= columns) return Array.from({ length: n }, (_, i) => [timesS[i]!, temps[i]!, temps[i]!]);
  const startS = timesS[0]!;
  const widthS = (timesS[n - 1]! - startS) / columns;
  const trace: TraceColumn[] = [];
  let place = -1;
  let last: TraceColumn | undefined;
  for (let i = 0; i < n; i++) {
    const temp = temps[i]!;
    const at = Math.min(columns - 1, Math.floor((timesS[i]! - startS) / widthS));
    if (last === undefined || at !== place) {
      place = at;
      last = [timesS[i]!, temp, temp];
      trace.push(last);
    } else if (temp < last[1]) {
      last[1] = temp;
    } else if (temp > last[2]) {
      last[2] = temp;
    }
  }
  return trace;
}
