import { useQuery } from '@tanstack/react-query';
import type { SpecifiedRating } from '#shared/schemas/homes.ts';
import { toCelsius, toKelvinStep } from '#shared/units.ts';
import { DEFAULT_RATING } from '#shared/analysis/rating.ts';
import { machineQuery } from '../../../api/machines.ts';
import type { Bands } from '../../../chart/strip.ts';

/** The stripes that the machine is specified to have: for the heat setting that was chosen, else the first it has. */
export function useBandsFor(machineId: string, setting: string): Bands | null {
  const machine = useQuery(machineQuery(machineId));
  const specified = machine.data?.specified ?? [];
  const wanted = specified.find((one) => one.setting === setting);
  const shown = wanted ?? (setting === '' ? specified[0] : undefined);
  return shown ? bandsOf(shown) : null;
}

/** As printed on a chart, °C; null for a part that does not close again. */
export function bandsOf({ rating, limit }: SpecifiedRating): Bands | null {
  const { unit, opens, opensTol, closes, closesTol } = rating;
  if (closes === null) return null;
  return {
    opensC: toCelsius(opens, unit),
    opensTolK: toKelvinStep(opensTol, unit),
    closesC: toCelsius(closes, unit),
    closesTolK: toKelvinStep(closesTol ?? 0, unit),
    highLimitC: limit ? toCelsius(limit.opens, limit.unit) : DEFAULT_RATING.highLimitC,
  };
}
