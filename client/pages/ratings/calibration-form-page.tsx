import { useQuery } from '@tanstack/react-query';
import { useWatch } from 'react-hook-form';
import { useNavigate, useParams } from 'react-router-dom';
import type { StoredProbe } from '#shared/schemas/ratings.ts';
import { useRecordCalibration } from '../../api/calibrations.ts';
import { probesQuery } from '../../api/probes.ts';
import { Crumb } from '../../components/crumb.tsx';
import { Cells, PickField, TextAreaField, TextField } from '../../components/field.tsx';
import { DeskPage } from '../../components/frame.tsx';
import { NothingHere } from '../../components/nothing-here.tsx';
import { SectionHead } from '../../components/section-head.tsx';
import { UnfetchedPage } from '../../components/waiting.tsx';
import { FormFrame, FormHead } from '../../forms/form-frame.tsx';
import { useCheckedForm } from '../../forms/use-checked-form.ts';
import { useNowMs } from '../../format/use-now.ts';
import { dayOf } from '../../format/when.ts';
import { useSession } from '../frame/session-context.ts';
import { BathCells, ReferenceCells } from './calibration-points.tsx';
import { CalibrationResult } from './calibration-result.tsx';
import {
  REFERENCE_ROWS,
  typedCalibrationSchema,
  type TypedCalibration,
} from './typed-calibration.ts';

const KINDS = [
  { value: 'ice-and-boiling', words: 'Ice and boiling' },
  { value: 'reference', words: 'Reference' },
];

export function NewCalibrationPage() {
  const { id = '' } = useParams();
  const probes = useQuery(probesQuery());
  if (!probes.data) return <UnfetchedPage noun="probe" query={probes} />;
  const probe = probes.data.find((each) => each.id === id);
  return probe ? <CalibrationForm probe={probe} /> : <NothingHere />;
}

function blankCalibration(today: string): TypedCalibration {
  return {
    kind: 'ice-and-boiling',
    madeAtMs: today,
    points: Array.from({ length: REFERENCE_ROWS }, () => ({ reference: '', readings: '' })),
    ...{ pressureHPa: '', altitudeM: '', referenceName: '', referenceU: '' },
    ...{ resolution: '0.1', drift: '', intervalMonths: '12', notes: '' },
  };
}

function useCalibrationForm(probe: StoredProbe) {
  const { zone } = useSession().shop;
  const today = dayOf(useNowMs(), zone);
  const record = useRecordCalibration(probe.id);
  const navigate = useNavigate();
  const schema = typedCalibrationSchema(probe.unit, zone);
  const form = useCheckedForm({
    schema,
    defaultValues: blankCalibration(today),
    figures: {
      drift: 'how far it may drift',
      resolution: 'the steps of its display',
      pressureHPa: 'the air pressure',
      altitudeM: 'the altitude',
      referenceU: 'the reference’s uncertainty',
    },
    save: async (calibration) => {
      await record.mutateAsync(calibration);
      await navigate(`/probes/${probe.id}/calibrations`);
    },
  });
  const typed = useWatch({
    control: form.control,
    compute: (values: TypedCalibration) => values,
  });
  const checked = schema.safeParse(typed);
  return { form, kind: typed.kind, calibration: checked.success ? checked.data : null };
}

function CalibrationForm({ probe }: { probe: StoredProbe }) {
  const { form, kind, calibration } = useCalibrationForm(probe);
  const { register, fault } = form;
  const { unit } = probe;
  const leave = `/probes/${probe.id}/calibrations`;
  const pointsFault = fault('points');
  return (
    <DeskPage>
      <FormHead
        form={form}
        title={`Calibrate ${probe.name}`}
        above={<Crumb to={leave}>Calibrations of {probe.name}</Crumb>}
        lead="Later runs are judged on readings corrected by it. Earlier ones keep what they were judged with."
      />
      <div className="grid gap-x-12 gap-y-8 desk:grid-cols-[minmax(0,1fr)_minmax(0,440px)]">
        <FormFrame form={form} doer="Record the calibration" leave={leave}>
          <Cells className="mb-4 grid-cols-2">
            <PickField
              label="How"
              options={KINDS}
              {...register('kind')}
              error={fault('kind')}
              className="col-span-2 desk:col-span-1"
            />
            <TextField
              label="Done on"
              type="date"
              {...register('madeAtMs')}
              error={fault('madeAtMs')}
              className="col-span-2 desk:col-span-1"
            />
          </Cells>
          {kind === 'reference' ? (
            <ReferenceCells form={form} unit={unit} />
          ) : (
            <BathCells form={form} unit={unit} />
          )}
          {pointsFault && (
            <p id="field-points" tabIndex={-1} className="pt-2 font-semibold text-stop">
              {pointsFault}
            </p>
          )}
          <Cells className="mt-4 grid-cols-2">
            <TextField
              label={`Steps of its display, °${unit}`}
              inputMode="decimal"
              {...register('resolution')}
              error={fault('resolution')}
            />
            <TextField
              label="Next one due in, months"
              inputMode="numeric"
              {...register('intervalMonths')}
              error={fault('intervalMonths')}
            />
            <TextField
              label={`May drift until then by, ± °${unit}`}
              inputMode="decimal"
              {...register('drift')}
              error={fault('drift')}
              hint="As its maker says, or as far as it moved between two calibrations"
              className="col-span-2"
            />
            <TextAreaField
              label="Notes"
              {...register('notes')}
              error={fault('notes')}
              className="col-span-2"
            />
          </Cells>
        </FormFrame>
        <section aria-labelledby="follows">
          <SectionHead id="follows">What follows</SectionHead>
          {calibration ? (
            <CalibrationResult calibration={calibration} />
          ) : (
            <p className="pt-3 text-small text-print">
              The correction appears once the cells above say enough.
            </p>
          )}
        </section>
      </div>
    </DeskPage>
  );
}
