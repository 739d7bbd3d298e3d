import { DeskPage } from '../../components/frame.tsx';
import { PageHeading } from '../../components/page-heading.tsx';

export function UploadPage() {
  return (
    <DeskPage>
      <PageHeading>Upload</PageHeading>
    </DeskPage>
  );
}
