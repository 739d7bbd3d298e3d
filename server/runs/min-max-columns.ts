/** A stretch of time with its lowest and highest reading: [s of its first reading, lowest, highest]. */
export type Column = [timeS: number, lowest: number, highest: number];

export type ColumnFolder = {
  /** Takes the next readings, in order of time; NaN (no reading) is passed over. */
  add(timesS: Float64Array, temps: Float64Array): void;
  columns(): Column[];
};

/**
 * Folds readings into at most `most` columns of equal time between `fromS` and `toS`. Each reading counts in
 * exactly one column, so no peak can be lost; a stretch without readings has no column.
 */
export function foldColumns(most: number, fromS: number, toS: number): ColumnFolder {
  const columns: Column[] = [];
  const perS = toS > fromS ? most / (toS - fromS) : 0;
  let place = -1;

  function add(timesS: Float64Array, temps: Float64Array): void {
    for (let i = 0; i < timesS.length; i++) {
      const timeS = timesS[i]!;
      const temp = temps[i]!;
      if (Number.isNaN(temp)) continue;
      const at = Math.min(most - 1, Math.floor((timeS - fromS) * perS));
      const last = columns[columns.length - 1];
      if (last && at <= place) widen(last, temp);
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

/** The whole of a series in at most `most` columns. */
export function minMaxColumns(timesS: Float64Array, temps: Float64Array, most: number): Column[] {
  const folder = foldColumns(most, timesS[0] ?? 0, timesS.at(-1) ?? 0);
  folder.add(timesS, temps);
  return folder.columns();
}
