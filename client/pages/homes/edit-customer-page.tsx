import { DeskPage } from '../../components/frame.tsx';
import { PageHeading } from '../../components/page-heading.tsx';

export function EditCustomerPage() {
  return (
    <DeskPage>
      <PageHeading>Customer</PageHeading>
    </DeskPage>
  );
}
