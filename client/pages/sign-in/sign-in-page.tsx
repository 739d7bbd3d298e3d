import { DeskPage } from '../../components/frame.tsx';
import { PageHeading } from '../../components/page-heading.tsx';

export function SignInPage() {
  return (
    <DeskPage>
      <PageHeading>Sign in</PageHeading>
    </DeskPage>
  );
}
