import { DeskPage } from '../../components/frame.tsx';
import { PageHeading } from '../../components/page-heading.tsx';

export function MachinePage() {
  return (
    <DeskPage>
      <PageHeading>Machine</PageHeading>
    </DeskPage>
  );
}
