import { DeskPage } from '../../components/frame.tsx';
import { PageHeading } from '../../components/page-heading.tsx';

export function JobPage() {
  return (
    <DeskPage>
      <PageHeading>Job</PageHeading>
    </DeskPage>
  );
}
