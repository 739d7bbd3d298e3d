import { useRef, useState, type DragEvent } from 'react';
import { ApiError } from '../../api/http.ts';
import { useSendFile } from '../../api/uploads.ts';
import { ErrorSummary, type FormProblem } from '../../components/error-summary.tsx';
import { fieldId } from '../../components/field.tsx';
import { OutsideGlyph } from '../../components/glyphs.tsx';
import { Key } from '../../components/key.tsx';
import { PageHeading } from '../../components/page-heading.tsx';
import { checkFile, sayBytes } from './check-file.ts';
import { Progress } from './progress.tsx';

type SendFileProps = {
  visitId: string;
  onSent: (uploadId: string, file: File) => void;
};

type Sent = { file: File; share: number; stop: AbortController };

/** Pick or drop a file; it is checked here first, then sent, with a way out at any time. */
export function SendFile({ visitId, onSent }: SendFileProps) {
  const send = useSendFile();
  const [sent, setSent] = useState<Sent | null>(null);
  const [fault, setFault] = useState<string | null>(null);
  const [attempt, setAttempt] = useState(0);

  function handlePick(file: File | undefined) {
    const wrong = checkFile(file);
    setFault(wrong);
    setAttempt(attempt + 1);
    if (wrong !== null || !file) return;
    const stop = new AbortController();
    setSent({ file, share: 0, stop });
    const onProgress = (share: number) => setSent({ file, share, stop });
    send.mutate(
      { visitId, file, onProgress, signal: stop.signal },
      {
        onSuccess: ({ id }) => onSent(id, file),
        onError: (error) => {
          setSent(null);
          if (error.name !== 'AbortError') setFault(wordsOf(error));
        },
      },
    );
  }

  const problems: FormProblem[] = fault === null ? [] : [{ name: 'file', message: fault }];
  return (
    <div className="mx-auto max-w-form px-4 pt-5 pb-10 desk:px-12">
      <ErrorSummary problems={problems} attempt={attempt} />
      <PageHeading hasErrors={fault !== null}>Upload a probe file</PageHeading>
      {sent ? <Sending {...sent} /> : <Picker fault={fault} onPick={handlePick} />}
    </div>
  );
}

function wordsOf(error: Error): string {
  return error instanceof ApiError
    ? error.message
    : 'The selected file could not be sent – try again';
}

function Sending({ file, share, stop }: Sent) {
  const of = `${sayBytes(Math.round(file.size * share))} of ${sayBytes(file.size)}`;
  return (
    <>
      <Progress share={share} figure={of}>
        {`Sending ${file.name}`}
      </Progress>
      <Key size="site" className="min-w-40" onClick={() => stop.abort()}>
        Cancel
      </Key>
    </>
  );
}

type PickerProps = { fault: string | null; onPick: (file: File | undefined) => void };

function Picker({ fault, onPick }: PickerProps) {
  const input = useRef<HTMLInputElement>(null);
  const [isOver, setIsOver] = useState(false);
  const id = fieldId('file');

  function handleDrop(event: DragEvent) {
    event.preventDefault();
    setIsOver(false);
    onPick(event.dataTransfer.files[0]);
  }

  return (
    <>
      <p className="max-w-read pt-2 pb-5 text-say">
        A .csv or .txt of up to 100&nbsp;MB, as the probe wrote it. Nothing is kept before you have
        seen how it was read.
      </p>
      <div
        onDragOver={(event) => {
          event.preventDefault();
          setIsOver(true);
        }}
        onDragLeave={() => setIsOver(false)}
        onDrop={handleDrop}
        className={`relative grid justify-items-start gap-4 border px-4 py-6 desk:px-6 desk:py-10 ${isOver ? 'border-ink bg-deck' : 'border-print bg-strip'} ${fault ? 'before:absolute before:inset-y-0 before:left-0 before:w-1.5 before:bg-stop' : ''}`}
      >
        <label htmlFor={id} className="lab">
          Probe file
        </label>
        <input
          ref={input}
          id={id}
          type="file"
          accept=".csv,.txt,text/csv,text/plain"
          aria-describedby={fault ? `${id}-fault` : undefined}
          aria-invalid={fault ? true : undefined}
          onChange={(event) => {
            onPick(event.target.files?.[0]);
            event.target.value = '';
          }}
          className="words w-full min-w-0 cursor-pointer text-[1.0625rem] file:mr-4 file:min-h-main file:cursor-pointer file:rounded-key file:border-line file:border-solid file:border-ink file:bg-ink file:px-[22px] file:font-gothic file:text-press file:text-paper"
        />
        <p className="hidden text-body desk:block">
          {isOver ? 'Let go to send it.' : 'Or drop it on this field.'}
        </p>
        {fault && (
          <p
            id={`${id}-fault`}
            className="flex gap-2 font-gothic text-[1rem] leading-[1.3] font-semibold text-stop"
          >
            <OutsideGlyph className="mt-0.5 size-[17px]" />
            <span className="min-w-0 wrap-anywhere">{fault}</span>
          </p>
        )}
      </div>
    </>
  );
}
