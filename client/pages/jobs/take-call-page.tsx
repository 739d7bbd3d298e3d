import { DeskPage } from '../../components/frame.tsx';
import { PageHeading } from '../../components/page-heading.tsx';

export function TakeCallPage() {
  return (
    <DeskPage>
      <PageHeading>Take a call</PageHeading>
    </DeskPage>
  );
}
