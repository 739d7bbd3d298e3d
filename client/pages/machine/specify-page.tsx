import { useQuery } from '@tanstack/react-query';
import { useNavigate, useParams } from 'react-router-dom';
import { z } from 'zod';
import { heatSettingSchema, type HeatSetting, type MachinePage } from '#shared/schemas/homes.ts';
import type { StoredRating } from '#shared/schemas/ratings.ts';
import { machineQuery, useSpecifyRating } from '../../api/machines.ts';
import { ratingsQuery } from '../../api/ratings.ts';
import { Crumb } from '../../components/crumb.tsx';
import { Cells, SelectField } from '../../components/field.tsx';
import { DeskPage } from '../../components/frame.tsx';
import { UnfetchedPage } from '../../components/waiting.tsx';
import { FormFrame, FormHead } from '../../forms/form-frame.tsx';
import { useCheckedForm } from '../../forms/use-checked-form.ts';
import { machineWords } from '../../format/job-words.ts';
import { NothingHere } from '../../components/nothing-here.tsx';
import { NoRatings } from './no-ratings.tsx';
import { RatingOptions } from './rating-options.tsx';

const CYCLING = ['cycling-thermostat', 'thermistor'];
const typedSpecifiedSchema = z.object({
  ratingId: z.string().min(1, 'Choose what the machine should have'),
  limitRatingId: z.string(),
});

export function SpecifyPage() {
  const { id = '', setting } = useParams();
  const machine = useQuery(machineQuery(id));
  const ratings = useQuery(ratingsQuery());
  const heat = heatSettingSchema.safeParse(setting);
  if (!heat.success) return <NothingHere />;
  if (!machine.data) return <UnfetchedPage noun="machine" query={machine} />;
  if (!ratings.data) return <UnfetchedPage noun="list of ratings" query={ratings} />;
  return <SpecifyForm machine={machine.data} setting={heat.data} ratings={ratings.data} />;
}

type SpecifyFormProps = { machine: MachinePage; setting: HeatSetting; ratings: StoredRating[] };

function SpecifyForm({ machine, setting, ratings }: SpecifyFormProps) {
  const specify = useSpecifyRating(machine.id);
  const navigate = useNavigate();
  const leave = `/machines/${machine.id}`;
  const before = machine.specified.find((each) => each.setting === setting);
  const form = useCheckedForm({
    schema: typedSpecifiedSchema,
    defaultValues: { ratingId: before?.rating.id ?? '', limitRatingId: before?.limit?.id ?? '' },
    save: async ({ ratingId, limitRatingId }) => {
      await specify.mutateAsync({ setting, ratingId, limitRatingId: limitRatingId || null });
      await navigate(leave);
    },
  });
  const { register, fault } = form;
  const cycling = ratings.filter(({ kind }) => CYCLING.includes(kind));
  const limits = ratings.filter(({ kind }) => !CYCLING.includes(kind));
  return (
    <DeskPage>
      <FormHead
        form={form}
        title={`What it should have on ${setting} heat`}
        above={<Crumb to={leave}>{machineWords(machine)}</Crumb>}
        lead="As the maker’s service sheet says, whatever is fitted now. Runs on this setting are judged by it."
      />
      {cycling.length === 0 ? (
        <NoRatings />
      ) : (
        <FormFrame form={form} doer="Save what it should have" leave={leave}>
          <Cells>
            <SelectField
              label="Thermostat, or thermistor set-point"
              {...register('ratingId')}
              error={fault('ratingId')}
            >
              <RatingOptions ratings={cycling} />
            </SelectField>
            <SelectField
              label="High limit: the safety that watches the exhaust"
              {...register('limitRatingId')}
              error={fault('limitRatingId')}
              hint="Not the limit in the heater housing, which the exhaust is never judged by."
            >
              <RatingOptions ratings={limits} none="The usual one, 196 °F" />
            </SelectField>
          </Cells>
        </FormFrame>
      )}
    </DeskPage>
  );
}
