import { DeskPage } from '../../components/frame.tsx';
import { PageHeading } from '../../components/page-heading.tsx';

export function NewHomePage() {
  return (
    <DeskPage>
      <PageHeading>New home</PageHeading>
    </DeskPage>
  );
}
