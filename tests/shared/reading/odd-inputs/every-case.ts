import { CELL_CASES } from './cases-of-cells.ts';
import { CLOCK_CASES } from './cases-of-clocks.ts';
import { TABLE_CASES } from './cases-of-tables.ts';
import { TEXT_CASES } from './cases-of-text.ts';

export const EVERY_CASE = [...TEXT_CASES, ...CELL_CASES, ...TABLE_CASES, ...CLOCK_CASES];
