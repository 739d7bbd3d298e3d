import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { useParams, useSearchParams } from 'react-router-dom';
import { visitQuery } from '../../api/visits.ts';
import { SitePage } from '../../components/frame.tsx';
import { Notice } from '../../components/notice.tsx';
import { PageHeading } from '../../components/page-heading.tsx';
import { Failed, Waiting } from '../../components/waiting.tsx';
import { TopLines } from '../visit/top-lines.tsx';
import { SendFile } from './send-file.tsx';
import { StagedFile } from './staged-file.tsx';

/** A probe's file on a visit: sent, read, looked at, put right, accepted. The address keeps which file it is. */
export function UploadPage() {
  const { id: visitId = '' } = useParams();
  const [search, setSearch] = useSearchParams();
  const visit = useQuery(visitQuery(visitId));
  const [file, setFile] = useState<File | null>(null);
  const uploadId = search.get('file');

  function handleSent(id: string, sent: File) {
    setFile(sent);
    setSearch({ file: id }, { replace: true });
  }

  const back = { to: `/visits/${visitId}`, name: 'Visit' };
  if (!visit.data || !visit.data.mayRecord) {
    return (
      <SitePage isWide back={back} top={<TopLines head="Upload" />}>
        <div className="px-4 desk:px-12">
          {visit.isPending && <Waiting>Fetching the visit…</Waiting>}
          {visit.isError && <Failed error={visit.error} onRetry={visit.refetch} />}
          {visit.data && <NotYours name={visit.data.technician.name} />}
        </div>
      </SitePage>
    );
  }
  if (uploadId !== null) {
    return (
      <StagedFile
        key={uploadId}
        uploadId={uploadId}
        visit={visit.data}
        file={file}
        onAnother={() => setSearch({}, { replace: true })}
        onSent={handleSent}
      />
    );
  }
  const { customer, machine } = visit.data.job;
  return (
    <SitePage
      isWide
      back={back}
      top={<TopLines head={customer.name} line={[machine.make, machine.model].join(' ')} />}
    >
      <SendFile visitId={visitId} onSent={handleSent} />
    </SitePage>
  );
}

function NotYours({ name }: { name: string }) {
  return (
    <>
      <PageHeading className="pt-5">Upload a probe file</PageHeading>
      <Notice head="Runs are recorded by the one whose visit it is." className="mt-5 max-w-form">
        This is a visit of {name}.
      </Notice>
    </>
  );
}
