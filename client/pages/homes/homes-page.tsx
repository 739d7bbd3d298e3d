import { DeskPage } from '../../components/frame.tsx';
import { PageHeading } from '../../components/page-heading.tsx';

export function HomesPage() {
  return (
    <DeskPage>
      <PageHeading>Homes</PageHeading>
    </DeskPage>
  );
}
