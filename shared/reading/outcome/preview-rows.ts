import { TICKS_PER_S } from '../clock/parse-stamp.ts';
import type { Layout } from '../layout/layout.ts';
import type { SampleLines } from '../layout/sample-lines.ts';
import type { PreviewRow } from '../log-reading.ts';
import { planRow } from '../rows/row-plan.ts';
import { readSlowRow } from '../rows/slow-row.ts';
import { signalToC, type Signal } from '../signals/signal.ts';
import { splitCells } from '../text/split-cells.ts';

const SHOWN = 12;

/** Where the kept readings are, so that the preview shows them as they were put right. */
export type KeptReadings = { timesS: Float64Array; temps: Float64Array; rows: Int32Array };

/** The first rows as understood; time and reading are null where the row is not kept. */
export function previewRows(
  { sample }: { sample: SampleLines },
  layout: Layout,
  column: number,
  kept?: KeptReadings,
): PreviewRow[] {
  const lines = sample.head.filter(({ row, text }) => row >= layout.firstRow && text.trim() !== '');
  const shown = lines.slice(0, SHOWN).map(({ row, text }) => ({
    row,
    cells: splitCells(text, layout.delimiter).cells,
  }));
  return kept ? shown.map((line) => asKept(line, kept)) : asRead(shown, layout, column);
}

function asKept({ row, cells }: { row: number; cells: string[] }, kept: KeptReadings): PreviewRow {
  const at = kept.rows.indexOf(row);
  if (at < 0) return { row, cells, timeS: null, temp: null };
  return { row, cells, timeS: kept.timesS[at]!, temp: kept.temps[at]! };
}

/** As an answer would have it; the terminals of a thermocouple are at what the file states, else at 0 °C. */
function convertedTemp(signal: Signal | undefined, value: number): number {
  if (!signal?.sensor) return value;
  return signalToC(signal, signal.sensor, value, signal.terminalC ?? 0);
}

function asRead(
  lines: { row: number; cells: string[] }[],
  layout: Layout,
  column: number,
): PreviewRow[] {
  const plan = planRow(layout);
  const place = layout.tempColumns.indexOf(column);
  let startTicks: number | null = null;
  return lines.map(({ row, cells }, k) => {
    const read = readSlowRow(cells, plan, k);
    const temp = convertedTemp(layout.columns[column]?.signal, read.temps[place] ?? NaN);
    if (Number.isNaN(read.ticks)) return { row, cells, timeS: null, temp: null };
    startTicks ??= read.ticks;
    const timeS = (read.ticks - startTicks) / TICKS_PER_S;
    return { row, cells, timeS, temp: Number.isNaN(temp) ? null : temp };
  });
}
