import { useQuery } from '@tanstack/react-query';
import { useParams } from 'react-router-dom';
import { PROBE_KINDS, type StoredProbe } from '#shared/schemas/ratings.ts';
import { probesQuery } from '../../api/probes.ts';
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
import { PROBE_KIND_WORDS } from '../../format/rating-words.ts';
import { ClassField } from './class-field.tsx';
import { useProbeForm } from './use-probe-form.ts';

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

const UNITS = [
  { value: 'F', words: '°F' },
  { value: 'C', words: '°C' },
];

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
          <ClassField form={form} />
          <TextField
            label="Accuracy, ±"
            inputMode="decimal"
            {...register('accuracy', typedNumber)}
            error={fault('accuracy')}
            hint="as its maker states it, meter and all"
          />
          <TextField
            label="Response time in moving air, s"
            inputMode="decimal"
            {...register('responseS', typedNumber)}
            error={fault('responseS')}
            hint="leave empty if not known"
          />
          <TextField
            label="Certificate of"
            type="date"
            {...register('calibratedOn')}
            error={fault('calibratedOn')}
          />
          <TextField
            label="Its uncertainty then, ±"
            inputMode="decimal"
            {...register('calibrationU', typedNumber)}
            error={fault('calibrationU')}
            hint="k = 2, from a certificate that gives no corrections"
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
