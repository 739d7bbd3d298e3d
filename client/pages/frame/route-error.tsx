import { useRouteError } from 'react-router-dom';
import { Key } from '../../components/key.tsx';
import { Notice } from '../../components/notice.tsx';
import { PageHeading } from '../../components/page-heading.tsx';

/** A chunk that could not be fetched: the server was down, or a newer version replaced it. */
function isMissingChunk(error: unknown) {
  return error instanceof TypeError && /import|module/i.test(error.message);
}

/** Where a defect of ours ends: it says so and offers the page again. */
export function RouteError() {
  const error = useRouteError();
  const words = isMissingChunk(error)
    ? 'This page could not be fetched. The server may be starting, or a newer version is there.'
    : 'This page broke. That is a defect of Fusekeeper; nothing that was saved is lost.';
  return (
    <main id="main" className="px-4 pt-6 desk:px-12">
      <PageHeading>This page did not open</PageHeading>
      <Notice kind="stop" role="alert" head={words} className="my-6 max-w-form">
        <div className="pt-3">
          <Key onClick={() => window.location.reload()}>Try again</Key>
        </div>
      </Notice>
    </main>
  );
}
