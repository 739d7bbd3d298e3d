import type { MachinePage } from '../schemas/homes.ts';
import type { JudgedBy, RunConditions } from '../schemas/runs.ts';
import { judgedBy } from './judged-by.ts';

/** Of a machine: what it is specified to have, by heat setting. */
export type Specifying = Pick<MachinePage, 'specified'>;

/** What a machine is specified to have for a heat setting; null where nothing is. */
export function specifiedFor(
  machine: Specifying,
  setting: RunConditions['setting'],
): JudgedBy | null {
  const specified = machine.specified.find((each) => each.setting === setting);
  return specified ? judgedBy(specified.rating, specified.limit) : null;
}
