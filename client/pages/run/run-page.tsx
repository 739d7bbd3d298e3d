import { DeskPage } from '../../components/frame.tsx';
import { PageHeading } from '../../components/page-heading.tsx';

export function RunPage() {
  return (
    <DeskPage>
      <PageHeading>Run</PageHeading>
    </DeskPage>
  );
}
