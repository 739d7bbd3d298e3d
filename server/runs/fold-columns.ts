/** A stretch of time with its lowest and highest reading: [s of its first reading, lowest, highest]. */
export type Column = [timeS: number, lowest: number, highest: number];

export type ColumnFolder = {
  /** Takes the next readings, in order of time; NaN (no reading) is passed over. */
  add(timesS: Float64Array, temps: Float64Array): void;
  columns(): Column[];
};

/**
 * Folds a run that comes in pieces into at most `most` columns of equal time. Each reading counts in exactly one
 * column, so no peak can be lost; a stretch without readings has no column, and few readings keep one each.
 */
export function foldColumns(
  most: number,
  { samples, durationS }: { samples: number; durationS: number },
): ColumnFolder {
  const columns: Column[] = [];
  const perS = durationS > 0 ? most / durationS : 0;
  const isEachOwn = samples <= most;
  let place = -1;

  function add(timesS: Float64Array, temps: Float64Array): void {
    for (let i = 0; i < timesS.length; i++) {
      const timeS = timesS[i]!;
      const temp = temps[i]!;
      if (Number.isNaN(temp)) continue;
      const at = isEachOwn ? place + 1 : Math.min(most - 1, Math.floor(timeS * perS));
      const last = columns[columns.length - 1];
      if (last && at === place) widen(last, temp);
      else columns.push([timeS, temp, temp]);
      place = at;
    }
  }
  return { add, columns: () => columns };
}

function widen(column: Column, temp: number): void {
  if (temp < column[1]) column[1] = temp;
  if (temp > column[2]) column[2] = temp;
}
