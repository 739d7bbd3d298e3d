import { useState } from 'react';
import type { Upload } from '#shared/schemas/uploads.ts';
import { useSendFile } from '../../api/uploads.ts';
import { ErrorSummary } from '../../components/error-summary.tsx';
import { Key } from '../../components/key.tsx';
import { WordLink } from '../../components/key-link.tsx';
import { PageHeading } from '../../components/page-heading.tsx';

type Problem = Extract<Upload['reading'], { state: 'refused' }>['problem'];

type RefusalProps = {
  upload: Upload;
  problem: Problem;
  file: File | null;
  onAnother: () => void;
  onSent: (uploadId: string, file: File) => void;
};

/** Why the file was refused: what is wrong, where it stands, and what to do. Nothing of it is left on the server. */
export function Refusal({ upload, problem, file, onAnother, onSent }: RefusalProps) {
  const send = useSendFile();
  const [again] = useState(() => new AbortController());
  const problems = [problem.message, send.error?.message]
    .filter((message) => message !== undefined)
    .map((message) => ({ name: null, message }));

  function handleAsFound(sent: File) {
    send.mutate(
      { visitId: upload.visitId, file: sent, onProgress: () => {}, signal: again.signal },
      { onSuccess: ({ id }) => onSent(id, sent) },
    );
  }

  return (
    <>
      <ErrorSummary problems={problems} attempt={send.submittedAt} />
      <PageHeading hasErrors>{`${upload.fileName} was not read`}</PageHeading>
      <WhereItStands problem={problem} />
      <h2 className="pt-5 font-gothic text-section">What to do</h2>
      <p className="max-w-read pt-1 pb-5 text-say">{problem.hint}</p>
      <div className="flex flex-wrap items-center gap-4">
        <Key face="main" size="site" className="min-w-52" onClick={onAnother}>
          Choose another file
        </Key>
        {file && wasCorrected(upload) && (
          <Key size="site" disabled={send.isPending} onClick={() => handleAsFound(file)}>
            Read it again without corrections
          </Key>
        )}
        <WordLink to={`/visits/${upload.visitId}`}>Back to the visit</WordLink>
      </div>
    </>
  );
}

function wasCorrected({ choices }: Upload) {
  return choices.channel !== null || Object.keys(choices.answers).length > 0;
}

function WhereItStands({ problem: { row, column, value } }: { problem: Problem }) {
  const facts = [
    { name: 'Row', fact: row?.toLocaleString('en-US') },
    { name: 'Column', fact: column },
    { name: 'Value', fact: value },
  ].filter(({ fact }) => fact !== null && fact !== undefined);
  if (facts.length === 0) return null;
  return (
    <dl className="mt-5 flex flex-wrap border-y border-print bg-strip">
      {facts.map(({ name, fact }) => (
        <div key={name} className="min-w-24 border-r border-rule px-4 py-2.5 last:border-r-0">
          <dt className="lab">{name}</dt>
          <dd className="fig max-w-full text-[1.25rem] leading-[1.3] font-medium wrap-anywhere whitespace-pre-wrap">
            {fact}
          </dd>
        </div>
      ))}
    </dl>
  );
}
