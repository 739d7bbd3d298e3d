import { DeskPage } from '../../components/frame.tsx';
import { PageHeading } from '../../components/page-heading.tsx';

export function NewMachinePage() {
  return (
    <DeskPage>
      <PageHeading>New machine</PageHeading>
    </DeskPage>
  );
}
