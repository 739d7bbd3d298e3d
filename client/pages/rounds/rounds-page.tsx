import { DeskPage } from '../../components/frame.tsx';
import { PageHeading } from '../../components/page-heading.tsx';

export function RoundsPage() {
  return (
    <DeskPage>
      <PageHeading>Rounds</PageHeading>
    </DeskPage>
  );
}
