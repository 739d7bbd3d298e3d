import { useQuery } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import { useNavigate } from 'react-router-dom';
import type { VisitPage } from '#shared/schemas/jobs.ts';
import { ApiError } from '../../api/http.ts';
import { uploadQuery, useDiscardUpload } from '../../api/uploads.ts';
import { SitePage } from '../../components/frame.tsx';
import { Key } from '../../components/key.tsx';
import { Notice } from '../../components/notice.tsx';
import { PageHeading } from '../../components/page-heading.tsx';
import { Failed, Waiting } from '../../components/waiting.tsx';
import { TopLines } from '../visit/top-lines.tsx';
import { sayBytes } from './check-file.ts';
import { ReadFile } from './preview/read-file.tsx';
import { Progress } from './progress.tsx';
import { Question } from './question.tsx';
import { Refusal } from './refusal.tsx';
import { dropDraft } from './upload-draft.ts';

type StagedFileProps = {
  uploadId: string;
  visit: VisitPage;
  /** The file itself, where it was picked on this page and the page was not reloaded since. */
  file: File | null;
  onAnother: () => void;
  onSent: (uploadId: string, file: File) => void;
};

/** A file that the server holds for now: being read, asked about, refused, or read. */
export function StagedFile({ uploadId, visit, file, onAnother, onSent }: StagedFileProps) {
  const upload = useQuery(uploadQuery(uploadId));
  const discard = useDiscardUpload();
  const navigate = useNavigate();
  const visitPath = `/visits/${visit.id}`;

  async function handleLeave() {
    await discard.mutateAsync(uploadId);
    dropDraft(uploadId);
    await navigate(visitPath);
  }
  async function handleAnother() {
    await discard.mutateAsync(uploadId);
    dropDraft(uploadId);
    onAnother();
  }

  const frame = (children: ReactNode) => (
    <SitePage
      isWide
      back={{ to: visitPath, name: 'Visit' }}
      top={<TopLines head={visit.job.customer.name} line={upload.data?.fileName ?? ''} />}
    >
      <div className="mx-auto max-w-form px-4 pt-5 pb-10 desk:px-12">
        {discard.isError && <Failed error={discard.error} />}
        {children}
      </div>
    </SitePage>
  );

  if (upload.isPending) return frame(<Waiting>Fetching the file…</Waiting>);
  if (upload.isError) {
    return frame(
      isGone(upload.error) ? (
        <Gone onAnother={onAnother} />
      ) : (
        <Failed error={upload.error} onRetry={upload.refetch} />
      ),
    );
  }

  const { reading, fileName, bytes } = upload.data;
  switch (reading.state) {
    case 'reading':
      return frame(
        <>
          <PageHeading>Upload a probe file</PageHeading>
          <Progress share={reading.done} figure={sayBytes(bytes)}>
            {`Reading ${fileName}`}
          </Progress>
          <Key size="site" className="min-w-40" onClick={() => void handleLeave()}>
            Cancel
          </Key>
        </>,
      );
    case 'question':
      return frame(
        <Question
          upload={upload.data}
          question={reading.question}
          onLeave={() => void handleLeave()}
        />,
      );
    case 'refused':
      return frame(
        <Refusal
          upload={upload.data}
          problem={reading.problem}
          file={file}
          onAnother={() => void handleAnother()}
          onSent={onSent}
        />,
      );
    case 'read':
      return (
        <ReadFile
          key={reading.preview.resultHash}
          upload={upload.data}
          preview={reading.preview}
          visit={visit}
          onLeave={handleLeave}
        />
      );
  }
}

function isGone(error: Error) {
  return error instanceof ApiError && error.status === 404;
}

function Gone({ onAnother }: { onAnother: () => void }) {
  return (
    <>
      <PageHeading>This file is no longer here</PageHeading>
      <Notice head="A file that nobody accepts is kept for less than an hour." className="mt-5">
        <p>Nothing of it is left. Send it again to go on.</p>
        <div className="pt-3">
          <Key face="main" size="site" onClick={onAnother}>
            Choose the file
          </Key>
        </div>
      </Notice>
    </>
  );
}
