import { useNavigate } from 'react-router-dom';
import { z } from 'zod';
import { classesOf } from '#shared/probes/probe-class.ts';
import { sensorOf } from '#shared/probes/sensor-of.ts';
import { newProbeSchema, type StoredProbe } from '#shared/schemas/ratings.ts';
import { useSaveProbe } from '../../api/probes.ts';
import { useCheckedForm } from '../../forms/use-checked-form.ts';
import { dayOf, instantAt } from '../../format/when.ts';
import { useSession } from '../frame/session-context.ts';

/** The day of the last calibration is typed as a day; noon in the shop's zone stands for it. */
const typedProbeSchema = newProbeSchema
  .omit({ calibratedAtMs: true })
  .extend({ calibratedOn: z.string() });
type TypedProbe = z.input<typeof typedProbeSchema>;

export type ProbeForm = ReturnType<typeof useProbeForm>;

/** The cells of a probe: filled from one, or blank; saved as it is typed. */
export function useProbeForm(probe: StoredProbe | null) {
  const { unit, zone } = useSession().shop;
  const saveProbe = useSaveProbe(probe?.id ?? null);
  const navigate = useNavigate();
  return useCheckedForm<TypedProbe, z.output<typeof typedProbeSchema>>({
    schema: typedProbeSchema,
    defaultValues: typedProbe(probe, unit, zone),
    fieldNames: { calibratedAtMs: 'calibratedOn' },
    figures: {
      accuracy: 'the accuracy',
      responseS: 'the response time',
      calibrationU: 'its uncertainty',
    },
    save: async ({ calibratedOn, ...changed }) => {
      const calibratedAtMs = calibratedOn === '' ? null : instantAt(calibratedOn, '12:00', zone);
      const accuracyClass = fits(changed) ? changed.accuracyClass : null;
      await saveProbe.mutateAsync({ ...changed, accuracyClass, calibratedAtMs });
      await navigate('/ratings');
    },
  });
}

/** A class chosen before the kind was changed is none of the new kind. */
function fits({ kind, accuracyClass }: Pick<StoredProbe, 'kind' | 'accuracyClass'>): boolean {
  const sensor = sensorOf(kind);
  return accuracyClass !== null && sensor !== null && classesOf(sensor).includes(accuracyClass);
}

function typedProbe(probe: StoredProbe | null, unit: 'F' | 'C', zone: string) {
  if (probe === null) {
    const blank = { name: '', kind: 'thermocouple-k' as const, unit, notes: '', calibratedOn: '' };
    return { ...blank, accuracyClass: null, responseS: null, calibrationU: null };
  }
  const { calibratedAtMs, ...rest } = probe;
  return { ...rest, calibratedOn: calibratedAtMs === null ? '' : dayOf(calibratedAtMs, zone) };
}
