import { DeskPage } from '../../components/frame.tsx';
import { PageHeading } from '../../components/page-heading.tsx';

export function VisitPage() {
  return (
    <DeskPage>
      <PageHeading>Visit</PageHeading>
    </DeskPage>
  );
}
