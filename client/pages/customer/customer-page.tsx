import { DeskPage } from '../../components/frame.tsx';
import { PageHeading } from '../../components/page-heading.tsx';

export function CustomerPage() {
  return (
    <DeskPage>
      <PageHeading>Your dryer</PageHeading>
    </DeskPage>
  );
}
