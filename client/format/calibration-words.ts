import type { CalibrationStanding } from '#shared/probes/probe-in-use.ts';
import type { CALIBRATION_KINDS } from '#shared/probes/calibrate-probe.ts';
import type { ProbeClass } from '#shared/probes/probe-class.ts';
import type { DisplayUnit } from '#shared/units.ts';
import { formatStep } from '#shared/wording/format.ts';

export const CALIBRATION_KIND_WORDS: Record<(typeof CALIBRATION_KINDS)[number], string> = {
  'ice-and-boiling': 'Ice and boiling water',
  reference: 'Beside a reference thermometer',
};

export const PROBE_CLASS_WORDS: Record<ProbeClass, string> = {
  'iec-1': 'IEC 60584-1, class 1',
  'iec-2': 'IEC 60584-1, class 2',
  'iec-3': 'IEC 60584-1, class 3',
  'astm-standard': 'ASTM E230, standard limits',
  'astm-special': 'ASTM E230, special limits',
  'pt-aa': 'IEC 60751, class AA',
  'pt-a': 'IEC 60751, class A',
  'pt-b': 'IEC 60751, class B',
  'pt-c': 'IEC 60751, class C',
};

/** Parts of an uncertainty budget, as shared/probes names them. */
export const BUDGET_WORDS: Record<string, string> = {
  accuracy: 'Accuracy as stated',
  correction: 'The points, and the line through them',
  calibration: 'Reference thermometer and drift',
  resolution: 'Steps of the display',
  lag: 'Lag behind the air',
  repeats: 'How it repeats',
};

/** "adds 1.2 °F", "takes 0.4 °F off", "adds nothing". */
export function addsWords(correctionK: number, unit: DisplayUnit): string {
  const step = formatStep(Math.abs(correctionK), unit);
  if (/^0\.0/.test(step)) return 'adds nothing';
  return correctionK > 0 ? `adds ${step}` : `takes ${step} off`;
}

/** What became of a calibration, as a sentence. `due` is its due date in words. */
export function standingWords(standing: CalibrationStanding, due: string): string {
  switch (standing) {
    case 'current':
      return `In date, due ${due}.`;
    case 'overdue':
      return `Past its due date, ${due}. It still corrects, and its drift goes on growing.`;
    case 'too-old':
      return `Set aside: past twice its interval, due ${due}. The stated accuracy counts in full.`;
    case 'no-better':
      return 'Set aside: it knows less than the stated accuracy, and agrees with it.';
  }
}
