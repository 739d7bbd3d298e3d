import { DeskPage } from '../../components/frame.tsx';
import { PageHeading } from '../../components/page-heading.tsx';

export function AddPersonPage() {
  return (
    <DeskPage>
      <PageHeading>Add a person</PageHeading>
    </DeskPage>
  );
}
