import { DeskPage } from '../../components/frame.tsx';
import { PageHeading } from '../../components/page-heading.tsx';

export function EditHomePage() {
  return (
    <DeskPage>
      <PageHeading>Home</PageHeading>
    </DeskPage>
  );
}
