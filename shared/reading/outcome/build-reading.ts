import { TICKS_PER_S } from '../clock/parse-stamp.ts';
import type { Layout } from '../layout/layout.ts';
import type { LogColumn, LogReading, ReadWarning, SkippedRow } from '../log-reading.ts';
import { resultHash } from '../result-hash.ts';
import type { RowFacts } from '../rows/read-rows.ts';
import { MOST_LISTED, type RowList, type RowStore } from '../rows/row-store.ts';
import { findDoubts } from '../tidy/find-doubts.ts';
import { findGaps } from '../tidy/find-gaps.ts';
import { findLoneReadings } from '../tidy/find-lone-readings.ts';
import { findOddTimes } from '../tidy/find-odd-times.ts';
import { warning } from '../words/warning-words.ts';
import { inCelsius, type FinishedChannel } from './finish-reading.ts';
import type { LogFile } from './log-file.ts';
import { previewRows } from './preview-rows.ts';

const WALL_CLOCKS = new Set(['stamp', 'date-time', 'unix', 'serial']);

/** More readings of another form than this are a way of writing. */
const FEW = 2;
const FEW_SHARE = 0.02;

/** What is told of a log that was read: its series, and everything set aside or put right. */
export function buildReading(
  file: LogFile,
  layout: Layout,
  store: RowStore,
  facts: RowFacts,
  channel: FinishedChannel,
  early: ReadWarning[],
): LogReading {
  const { place, unit, temps } = channel;
  const own = layout.columns[layout.tempColumns[place]!]!;
  const timesS = timesOf(store);
  const series = { timesS, tempsC: inCelsius(temps, unit) };
  const rows = store.rows.slice(0, store.count);
  const lists = [store.unread, store.passedOver, store.noReading[place]!, channel.sentinels];
  const skippedRows = mergeRows(lists);
  const answered = (file.options.answers?.unit ?? null) !== null;
  const columns = layout.columns.map((column) =>
    column.index === own.index && answered ? { ...column, unit, unitFrom: 'answered' } : column,
  );
  const warnings = [
    ...early,
    ...rowWarnings(layout, store, facts, place, own),
    ...findGaps(timesS, rows),
    ...findOddTimes(timesS, rows),
    ...findLoneReadings(temps, unit, rows),
    ...findDoubts(timesS, temps, { unit, clock: layout.clock, column: own.name }),
  ];
  if (isConstant(temps)) warnings.push(warning('no-change', { say: own.name }));
  return {
    series,
    temps,
    timeColumn: timeColumnName(layout),
    channel: own.name,
    channelUnit: unit,
    channels: channel.others,
    columns,
    encoding: file.text.encoding,
    delimiter: layout.delimiter,
    decimal: layout.decimal,
    clock: layout.clockWords,
    startedAt: startedAt(store, layout, facts),
    rows: store.count,
    skippedRows,
    skippedCount: lists.reduce((sum, { count }) => sum + count, 0),
    warnings,
    preview: previewRows(file, layout, own.index, { timesS, temps, rows }),
    resultHash: resultHash(timesS, temps),
  };
}

function timesOf({ ticks, count }: RowStore): Float64Array {
  const timesS = new Float64Array(count);
  const startTicks = ticks[0] ?? 0;
  for (let i = 0; i < count; i++) timesS[i] = (ticks[i]! - startTicks) / TICKS_PER_S;
  return timesS;
}

function rowWarnings(
  layout: Layout,
  store: RowStore,
  facts: RowFacts,
  place: number,
  own: LogColumn,
): ReadWarning[] {
  const warnings: ReadWarning[] = [];
  const open = store.noReading[place]!;
  if (open.count > 0)
    warnings.push(warning('open-sensor', { row: open.rows[0]!.row, say: open.count }));
  const { unread } = store;
  if (unread.count > 0) {
    warnings.push(warning('rows-set-aside', { row: unread.rows[0]!.row, say: unread.count }));
  }
  const again = facts.headersAgain;
  if (again.length > 0)
    warnings.push(warning('header-repeated', { row: again[0]!, say: again.length }));
  const odd = facts.oddForms[place]!;
  if (odd.row !== null && odd.count <= Math.max(FEW, store.count * FEW_SHARE)) {
    const usual = layout.usualDecimals[place];
    const at = { row: odd.row, column: own.name, value: String(usual), say: odd.count };
    warnings.push(warning('odd-form', at));
  }
  if (facts.convertedRow !== null) {
    warnings.push(warning('units-converted', { row: facts.convertedRow, value: own.unit ?? '' }));
  }
  return warnings;
}

function isConstant(temps: Float64Array): boolean {
  return temps.every((temp) => temp === temps[0]);
}

function mergeRows(lists: RowList[]): SkippedRow[] {
  const all = lists.flatMap(({ rows }) => rows);
  return all.sort((a, b) => a.row - b.row).slice(0, MOST_LISTED);
}

function timeColumnName({ clock, columns }: Layout): string {
  if (clock.kind === 'rows') return 'row';
  const name = columns[clock.column]!.name;
  return clock.kind === 'date-time' ? `${columns[clock.dateColumn]!.name}, ${name}` : name;
}

function startedAt(store: RowStore, { clock }: Layout, { offsetTicks }: RowFacts): string | null {
  if (!WALL_CLOCKS.has(clock.kind)) return null;
  const ms = Math.floor(((store.ticks[0] ?? 0) + offsetTicks) / 1000);
  const date = new Date(ms);
  return Number.isNaN(date.getTime()) ? null : date.toISOString().slice(0, 19).replace('T', ' ');
}
