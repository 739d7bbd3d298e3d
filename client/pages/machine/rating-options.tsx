import { RATING_KINDS, type StoredRating } from '#shared/schemas/ratings.ts';
import { RATING_KIND_WORDS, ratedWords } from '../../format/rating-words.ts';

type RatingOptionsProps = { ratings: StoredRating[]; none?: string };

/** Ratings to choose from, kind by kind. `none`: the words of choosing none. */
export function RatingOptions({ ratings, none = 'Choose one' }: RatingOptionsProps) {
  return (
    <>
      <option value="">{none}</option>
      {RATING_KINDS.map((kind) => {
        const ofKind = ratings.filter((rating) => rating.kind === kind);
        if (ofKind.length === 0) return null;
        return (
          <optgroup key={kind} label={RATING_KIND_WORDS[kind]}>
            {ofKind.map((rating) => (
              <option key={rating.id} value={rating.id}>
                {rating.name}, {ratedWords(rating)}
              </option>
            ))}
          </optgroup>
        );
      })}
    </>
  );
}
