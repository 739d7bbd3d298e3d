import { KeyLink } from '../../components/key-link.tsx';
import { mayRunOffice, useSession } from '../frame/session-context.ts';

/** A form of this kind chooses from the shop's ratings; there is none to choose yet. */
export function NoRatings() {
  const mayAdd = mayRunOffice(useSession());
  return (
    <>
      <p className="max-w-read pb-5 text-say">
        The shop’s list of ratings has none to choose yet.{' '}
        {!mayAdd && 'The office adds them on the Ratings page.'}
      </p>
      {mayAdd && (
        <KeyLink to="/ratings/new" face="main">
          Add a rating
        </KeyLink>
      )}
    </>
  );
}
