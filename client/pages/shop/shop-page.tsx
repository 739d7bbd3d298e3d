import { DeskPage } from '../../components/frame.tsx';
import { PageHeading } from '../../components/page-heading.tsx';

export function ShopPage() {
  return (
    <DeskPage>
      <PageHeading>Shop</PageHeading>
    </DeskPage>
  );
}
