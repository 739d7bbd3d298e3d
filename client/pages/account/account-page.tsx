import { DeskPage } from '../../components/frame.tsx';
import { PageHeading } from '../../components/page-heading.tsx';

export function AccountPage() {
  return (
    <DeskPage>
      <PageHeading>Account</PageHeading>
    </DeskPage>
  );
}
