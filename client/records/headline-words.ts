import type { FindingCode } from '#shared/analysis/analysis.ts';

/** What a run showed, in a few words for a list; the run page says it in full. */
export const HEADLINE_WORDS: Record<FindingCode, string> = {
  runaway: 'heat kept coming',
  'heat-stays-on': 'some heat stays on',
  'heat-lost': 'heat did not come back',
  'limit-cycling': 'cut short of the thermostat',
  drifting: 'cut-outs drift',
  scattered: 'cut-outs scatter',
  'opens-high': 'opens high',
  'opens-low': 'opens low',
  'closes-high': 'closes high',
  'closes-low': 'closes low',
  'below-cut-out': 'levels off below the cut-out',
  'no-heat': 'no heat',
  mixed: 'some points outside',
  'too-close': 'too close to call',
  'too-short': 'too short to say',
  'in-band': 'in band',
};
