import { DeskPage } from '../../components/frame.tsx';
import { PageHeading } from '../../components/page-heading.tsx';

export function MorePage() {
  return (
    <DeskPage>
      <PageHeading>More</PageHeading>
    </DeskPage>
  );
}
