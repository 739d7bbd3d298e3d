import { useQuery } from '@tanstack/react-query';
import { useNavigate, useParams } from 'react-router-dom';
import { z } from 'zod';
import { newProbeSchema, PROBE_KINDS, type StoredProbe } from '#shared/schemas/ratings.ts';
import { probesQuery, useSaveProbe } from '../../api/probes.ts';
import {
  Cells,
  PickField,
  SelectField,
  TextAreaField,
  TextField,
} from '../../components/field.tsx';
import { DeskPage } from '../../components/frame.tsx';
import { NothingHere } from '../../components/nothing-here.tsx';
import { UnfetchedPage } from '../../components/waiting.tsx';
import { FormFrame, FormHead } from '../../forms/form-frame.tsx';
import { typedNumber } from '../../forms/typed-number.ts';
import { useCheckedForm } from '../../forms/use-checked-form.ts';
import { PROBE_KIND_WORDS } from '../../format/rating-words.ts';
import { dayOf, instantAt } from '../../format/when.ts';
import { useSession } from '../frame/session-context.ts';

/** The day of the last calibration is typed as a day; noon in the shop's zone stands for it. */
const typedProbeSchema = newProbeSchema
  .omit({ calibratedAtMs: true })
  .extend({ calibratedOn: z.string() });
type TypedProbe = z.input<typeof typedProbeSchema>;

export function NewProbePage() {
  return <ProbeForm probe={null} />;
}

export function EditProbePage() {
  const { id = '' } = useParams();
  const probes = useQuery(probesQuery());
  if (!probes.data) return <UnfetchedPage noun="probe" query={probes} />;
  const probe = probes.data.find((each) => each.id === id);
  return probe ? <ProbeForm probe={probe} /> : <NothingHere />;
}

function typedProbe(probe: StoredProbe | null, unit: 'F' | 'C', zone: string) {
  if (probe === null) {
    const blank = { name: '', kind: 'thermocouple-k' as const, unit, notes: '', calibratedOn: '' };
    return { ...blank, responseS: null, calibrationU: null };
  }
  const { calibratedAtMs, ...rest } = probe;
  return { ...rest, calibratedOn: calibratedAtMs === null ? '' : dayOf(calibratedAtMs, zone) };
}

const UNITS = [
  { value: 'F', words: '°F' },
  { value: 'C', words: '°C' },
];

function useProbeForm(probe: StoredProbe | null) {
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
      await saveProbe.mutateAsync({ ...changed, calibratedAtMs });
      await navigate('/ratings');
    },
  });
}

function ProbeForm({ probe }: { probe: StoredProbe | null }) {
  const form = useProbeForm(probe);
  const { register, fault } = form;
  return (
    <DeskPage>
      <FormHead
        form={form}
        title={probe === null ? 'New probe' : `Change ${probe.name}`}
        lead="Its accuracy decides whether a point near the edge of a band can be called; its response time, whether a run can be judged at all."
      />
      <FormFrame form={form} doer="Save the probe" leave="/ratings">
        <Cells className="grid-cols-2">
          <TextField
            label="Name"
            {...register('name')}
            error={fault('name')}
            autoComplete="off"
            className="col-span-2"
          />
          <SelectField
            label="Kind"
            {...register('kind')}
            error={fault('kind')}
            className="col-span-2 desk:col-span-1"
          >
            {PROBE_KINDS.map((kind) => (
              <option key={kind} value={kind}>
                {PROBE_KIND_WORDS[kind]}
              </option>
            ))}
          </SelectField>
          <PickField
            label="Figures in"
            options={UNITS}
            {...register('unit')}
            error={fault('unit')}
            className="col-span-2 desk:col-span-1"
          />
          <TextField
            label="Accuracy, ±"
            inputMode="decimal"
            {...register('accuracy', typedNumber)}
            error={fault('accuracy')}
            hint="as its maker states it"
          />
          <TextField
            label="Response time in moving air, s"
            inputMode="decimal"
            {...register('responseS', typedNumber)}
            error={fault('responseS')}
            hint="leave empty if not known"
          />
          <TextField
            label="Last calibrated on"
            type="date"
            {...register('calibratedOn')}
            error={fault('calibratedOn')}
          />
          <TextField
            label="Its uncertainty then, ±"
            inputMode="decimal"
            {...register('calibrationU', typedNumber)}
            error={fault('calibrationU')}
            hint="k = 2, from the certificate"
          />
          <TextAreaField
            label="Notes"
            {...register('notes')}
            error={fault('notes')}
            className="col-span-2"
          />
        </Cells>
      </FormFrame>
    </DeskPage>
  );
}
