import { DeskPage } from '../../components/frame.tsx';
import { PageHeading } from '../../components/page-heading.tsx';

export function BookVisitPage() {
  return (
    <DeskPage>
      <PageHeading>Book a visit</PageHeading>
    </DeskPage>
  );
}
