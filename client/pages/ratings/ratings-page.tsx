import { DeskPage } from '../../components/frame.tsx';
import { PageHeading } from '../../components/page-heading.tsx';

export function RatingsPage() {
  return (
    <DeskPage>
      <PageHeading>Ratings</PageHeading>
    </DeskPage>
  );
}
