import { DeskPage } from '../../components/frame.tsx';
import { PageHeading } from '../../components/page-heading.tsx';

export function HomePage() {
  return (
    <DeskPage>
      <PageHeading>Home</PageHeading>
    </DeskPage>
  );
}
