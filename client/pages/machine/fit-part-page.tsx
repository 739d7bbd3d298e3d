import { useQuery } from '@tanstack/react-query';
import { useNavigate, useParams, useSearchParams } from 'react-router-dom';
import { z } from 'zod';
import { newFittedPartSchema, type MachinePage } from '#shared/schemas/homes.ts';
import type { StoredRating } from '#shared/schemas/ratings.ts';
import { machineQuery, useFitPart } from '../../api/machines.ts';
import { ratingsQuery } from '../../api/ratings.ts';
import { Crumb } from '../../components/crumb.tsx';
import { Cells, SelectField, TextField } from '../../components/field.tsx';
import { DeskPage } from '../../components/frame.tsx';
import { UnfetchedPage } from '../../components/waiting.tsx';
import { FormFrame, FormHead } from '../../forms/form-frame.tsx';
import { useCheckedForm } from '../../forms/use-checked-form.ts';
import { machineWords } from '../../format/job-words.ts';
import { useNowMs } from '../../format/use-now.ts';
import { clockOf, dayOf, instantAt } from '../../format/when.ts';
import { useSession } from '../frame/session-context.ts';
import { NoRatings } from './no-ratings.tsx';
import { RatingOptions } from './rating-options.tsx';

const typedPartSchema = newFittedPartSchema.pick({ supplier: true, lot: true }).extend({
  ratingId: z.string().min(1, 'Choose what was fitted'),
  day: z.string().min(1, 'Enter the day'),
  clock: z.string().min(1, 'Enter the time'),
});

export function FitPartPage() {
  const { id = '' } = useParams();
  const machine = useQuery(machineQuery(id));
  const ratings = useQuery(ratingsQuery());
  if (!machine.data) return <UnfetchedPage noun="machine" query={machine} />;
  if (!ratings.data) return <UnfetchedPage noun="list of ratings" query={ratings} />;
  return <FitPartForm machine={machine.data} ratings={ratings.data} />;
}

/** `?visit=` in the address ties the part to the visit that fits it, and leads back there. */
function useFitPartForm(machineId: string, leave: string, visitId: string | null) {
  const { zone } = useSession().shop;
  const fitPart = useFitPart(machineId);
  const navigate = useNavigate();
  const nowMs = useNowMs();
  return useCheckedForm({
    schema: typedPartSchema,
    defaultValues: {
      ...{ ratingId: '', supplier: '', lot: '' },
      day: dayOf(nowMs, zone),
      clock: clockOf(nowMs, zone),
    },
    fieldNames: { fittedAtMs: 'day' },
    save: async ({ day, clock, ...part }) => {
      const fittedAtMs = instantAt(day, clock, zone);
      if (fittedAtMs === null) return;
      await fitPart.mutateAsync({ ...part, visitId, fittedAtMs });
      await navigate(leave);
    },
  });
}

type FitPartFormProps = { machine: MachinePage; ratings: StoredRating[] };

function FitPartForm({ machine, ratings }: FitPartFormProps) {
  const visitId = useSearchParams()[0].get('visit');
  const leave = visitId === null ? `/machines/${machine.id}` : `/visits/${visitId}`;
  const form = useFitPartForm(machine.id, leave, visitId);
  const { register, fault } = form;
  return (
    <DeskPage>
      <FormHead
        form={form}
        title="Fit a part"
        above={<Crumb to={`/machines/${machine.id}`}>{machineWords(machine)}</Crumb>}
        lead="Supplier and lot trace a part to every other machine that has one of the same lot."
      />
      {ratings.length === 0 ? (
        <NoRatings />
      ) : (
        <FormFrame form={form} doer="Write down the part" leave={leave}>
          <Cells className="grid-cols-2">
            <SelectField
              label="What was fitted"
              {...register('ratingId')}
              error={fault('ratingId')}
              className="col-span-2"
            >
              <RatingOptions ratings={ratings} />
            </SelectField>
            <TextField label="Supplier" {...register('supplier')} error={fault('supplier')} />
            <TextField label="Lot" {...register('lot')} error={fault('lot')} />
            <TextField label="Day" type="date" {...register('day')} error={fault('day')} />
            <TextField label="Time" type="time" {...register('clock')} error={fault('clock')} />
          </Cells>
        </FormFrame>
      )}
    </DeskPage>
  );
}
