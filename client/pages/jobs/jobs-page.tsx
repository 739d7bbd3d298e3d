import { DeskPage } from '../../components/frame.tsx';
import { PageHeading } from '../../components/page-heading.tsx';

export function JobsPage() {
  return (
    <DeskPage>
      <PageHeading>Jobs</PageHeading>
    </DeskPage>
  );
}
