import { useQuery } from '@tanstack/react-query';
import { useNavigate, useParams } from 'react-router-dom';
import { z } from 'zod';
import { removedPartSchema, type FittedPart } from '#shared/schemas/homes.ts';
import { machineQuery, useRemovePart } from '../../api/machines.ts';
import { Cells, TextField } from '../../components/field.tsx';
import { DeskPage } from '../../components/frame.tsx';
import { UnfetchedPage } from '../../components/waiting.tsx';
import { FormFrame, FormHead } from '../../forms/form-frame.tsx';
import { useCheckedForm } from '../../forms/use-checked-form.ts';
import { RATING_KIND_WORDS } from '../../format/rating-words.ts';
import { useNowMs } from '../../format/use-now.ts';
import { clockOf, dayOf, instantAt } from '../../format/when.ts';
import { NothingHere } from '../../components/nothing-here.tsx';
import { useSession } from '../frame/session-context.ts';

const typedRemovalSchema = removedPartSchema.pick({ removedWhy: true }).extend({
  day: z.string().min(1, 'Enter the day'),
  clock: z.string().min(1, 'Enter the time'),
});

export function RemovePartPage() {
  const { id = '', partId = '' } = useParams();
  const machine = useQuery(machineQuery(id));
  if (!machine.data) return <UnfetchedPage noun="machine" query={machine} />;
  const part = machine.data.fitted.find((each) => each.id === partId);
  return part ? <RemovePartForm machineId={id} part={part} /> : <NothingHere />;
}

function RemovePartForm({ machineId, part }: { machineId: string; part: FittedPart }) {
  const { zone } = useSession().shop;
  const removePart = useRemovePart(machineId);
  const navigate = useNavigate();
  const leave = `/machines/${machineId}`;
  const nowMs = useNowMs();
  const form = useCheckedForm({
    schema: typedRemovalSchema,
    defaultValues: { removedWhy: '', day: dayOf(nowMs, zone), clock: clockOf(nowMs, zone) },
    fieldNames: { removedAtMs: 'day' },
    save: async ({ day, clock, removedWhy }) => {
      const removedAtMs = instantAt(day, clock, zone);
      if (removedAtMs === null) return;
      await removePart.mutateAsync({ partId: part.id, removedAtMs, removedWhy });
      await navigate(leave);
    },
  });
  const { register, fault } = form;
  return (
    <DeskPage>
      <FormHead
        form={form}
        title={`Take out ${part.rating.name}`}
        lead={`${RATING_KIND_WORDS[part.rating.kind]}. It stays in the machine’s history, struck through.`}
      />
      <FormFrame form={form} doer="Write down that it is out" leave={leave}>
        <Cells className="grid-cols-2">
          <TextField
            label="Why it came out"
            {...register('removedWhy')}
            error={fault('removedWhy')}
            className="col-span-2"
          />
          <TextField label="Day" type="date" {...register('day')} error={fault('day')} />
          <TextField label="Time" type="time" {...register('clock')} error={fault('clock')} />
        </Cells>
      </FormFrame>
    </DeskPage>
  );
}
