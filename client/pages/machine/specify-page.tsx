import { DeskPage } from '../../components/frame.tsx';
import { PageHeading } from '../../components/page-heading.tsx';

export function SpecifyPage() {
  return (
    <DeskPage>
      <PageHeading>Specified rating</PageHeading>
    </DeskPage>
  );
}
