import { useLocation } from 'react-router-dom';
import { DeskPage } from './frame.tsx';
import { KeyLink } from './key-link.tsx';
import { PageHeading } from './page-heading.tsx';

/** An address that names nothing, or nothing any more. */
export function NothingHere() {
  const { pathname } = useLocation();
  return (
    <DeskPage>
      <PageHeading>There is no such page</PageHeading>
      <p className="max-w-read pt-3 pb-6 text-say">
        Nothing stands at <span className="words break-all">{pathname}</span>. The address may be
        mistyped, or what it named was taken away.
      </p>
      <KeyLink to="/" face="main">
        Go to the first page
      </KeyLink>
    </DeskPage>
  );
}
