import { useQuery } from '@tanstack/react-query';
import { useNavigate, useParams } from 'react-router-dom';
import { newRatingSchema, type NewRating, type StoredRating } from '#shared/schemas/ratings.ts';
import { ratingsQuery, useSaveRating } from '../../api/ratings.ts';
import { DeskPage } from '../../components/frame.tsx';
import { NothingHere } from '../../components/nothing-here.tsx';
import { UnfetchedPage } from '../../components/waiting.tsx';
import { FormFrame, FormHead } from '../../forms/form-frame.tsx';
import { useCheckedForm } from '../../forms/use-checked-form.ts';
import { useSession } from '../frame/session-context.ts';
import { RatingCells } from './rating-cells.tsx';
import { RatingPreview } from './rating-preview.tsx';

export function NewRatingPage() {
  const { unit } = useSession().shop;
  return <RatingForm id={null} title="New rating" rating={blankRating(unit)} />;
}

export function EditRatingPage() {
  const { id = '' } = useParams();
  const ratings = useQuery(ratingsQuery());
  if (!ratings.data) return <UnfetchedPage noun="rating" query={ratings} />;
  const rating = ratings.data.find((each) => each.id === id);
  return rating ? <EditRating rating={rating} /> : <NothingHere />;
}

function EditRating({ rating: { id, ...rating } }: { rating: StoredRating }) {
  return <RatingForm id={id} title={`Change ${rating.name}`} rating={rating} />;
}

/** The rating as it stands in the cells: the ones still empty are null. */
export type TypedRating = Omit<NewRating, 'opens'> & { opens: number | null };

/** The allowances are common practice: the air runs ahead of the disc by up to about 10 °F. */
function blankRating(unit: 'F' | 'C'): TypedRating {
  const allowance = unit === 'F' ? 10 : 5.5;
  return {
    kind: 'cycling-thermostat',
    name: '',
    unit,
    opens: null,
    opensTol: unit === 'F' ? 5 : 3,
    closes: null,
    closesTol: unit === 'F' ? 5 : 3,
    overshoot: allowance,
    undershoot: allowance,
  };
}

const FIGURES = {
  opens: 'the temperature it opens at',
  opensTol: 'how far from that it may open',
  closes: 'the temperature it closes at',
  closesTol: 'how far from that it may close',
  overshoot: 'how far the air may run over',
  undershoot: 'how far the air may run under',
};

type RatingFormProps = { id: string | null; title: string; rating: TypedRating };

function RatingForm({ id, title, rating }: RatingFormProps) {
  const saveRating = useSaveRating(id);
  const navigate = useNavigate();
  const form = useCheckedForm<NewRating, NewRating>({
    schema: newRatingSchema,
    // An empty figure is null until something stands in its cell; the schema then asks for it.
    defaultValues: rating as NewRating,
    figures: FIGURES,
    save: async (changed) => {
      await saveRating.mutateAsync(changed);
      await navigate('/ratings');
    },
  });
  return (
    <DeskPage>
      <FormHead
        form={form}
        title={title}
        lead="What a thermostat, limit, cut-off or fuse is rated to do. The sheet inside the machine outranks this page."
      />
      <div className="grid items-start gap-x-12 gap-y-6 wide:grid-cols-[minmax(0,788px)_300px]">
        <FormFrame form={form} doer="Save the rating" leave="/ratings">
          <RatingCells form={form} />
        </FormFrame>
        <RatingPreview control={form.control} />
      </div>
    </DeskPage>
  );
}
