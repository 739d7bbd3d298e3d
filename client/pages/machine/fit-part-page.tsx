import { DeskPage } from '../../components/frame.tsx';
import { PageHeading } from '../../components/page-heading.tsx';

export function FitPartPage() {
  return (
    <DeskPage>
      <PageHeading>Fit a part</PageHeading>
    </DeskPage>
  );
}
