import { useEffect, useState } from 'react';
import { useWatch } from 'react-hook-form';
import { useNavigate } from 'react-router-dom';
import type { VisitPage } from '#shared/schemas/jobs.ts';
import type { ReadPreview, Upload } from '#shared/schemas/uploads.ts';
import { useAcceptUpload } from '../../../api/uploads.ts';
import { Deck } from '../../../components/deck.tsx';
import { ErrorSummary } from '../../../components/error-summary.tsx';
import { SitePage } from '../../../components/frame.tsx';
import { Key } from '../../../components/key.tsx';
import { Slip } from '../../../components/slip.tsx';
import { useCheckedForm } from '../../../forms/use-checked-form.ts';
import { useSession } from '../../frame/session-context.ts';
import { TopLines } from '../../visit/top-lines.tsx';
import {
  acceptFormSchema,
  emptyForm,
  toAcceptUpload,
  type AcceptForm,
  type CheckedForm,
} from '../accept-form.ts';
import { parseRunTime, formatRunTime } from '../run-time.ts';
import { dropDraft, loadDraft, saveDraft, withDraft } from '../upload-draft.ts';
import { HowItWasRead } from './how-it-was-read.tsx';
import { PreviewHead } from './preview-head.tsx';
import { RecordStrip, type KeptSpan } from './record-strip.tsx';
import { TellOfIt } from './tell-of-it.tsx';
import { useBandsFor } from './use-bands-for.ts';

type ReadFileProps = {
  upload: Upload;
  preview: ReadPreview;
  visit: VisitPage;
  onLeave: () => Promise<void>;
};

/** A file as it was read, and what a person says of it before it becomes a run. */
export function ReadFile({ upload, preview, visit, onLeave }: ReadFileProps) {
  const { shop } = useSession();
  const navigate = useNavigate();
  const accept = useAcceptUpload(upload.id);
  const firstRun = visit.runs.length + 1;
  const [start] = useState(() => ({
    form: withDraft(
      emptyForm(preview, shop.unit, firstRun),
      loadDraft(upload.id),
      preview.resultHash,
    ),
    schema: acceptFormSchema(preview.durationS),
  }));
  const form = useCheckedForm<AcceptForm, CheckedForm>({
    schema: start.schema,
    defaultValues: start.form,
    save: async (checked) => {
      const { runIds } = await accept.mutateAsync(toAcceptUpload(checked, upload, preview));
      dropDraft(upload.id);
      const only = runIds.length === 1 ? runIds[0] : undefined;
      await navigate(only ? `/runs/${only}` : `/visits/${visit.id}#runs`, { replace: true });
    },
  });
  const typed = useWatch({ control: form.control, compute: (values: AcceptForm) => values });
  useEffect(() => {
    if (!accept.isSuccess) saveDraft(upload.id, { resultHash: preview.resultHash, form: typed });
  }, [upload.id, preview.resultHash, typed, accept.isSuccess]);

  const bands = useBandsFor(visit.job.machine.id, typed.conditions.setting);
  const count = typed.spans.length;
  return (
    <SitePage
      isWide
      back={{ to: `/visits/${visit.id}`, name: 'Visit' }}
      top={<TopLines head={visit.job.customer.name} line={upload.fileName} />}
      deck={<Decide form={form} count={count} onLeave={onLeave} />}
    >
      <form id="accept-form" onSubmit={(event) => void form.handleSubmit(event)} noValidate>
        <div className="px-4 pt-5 desk:px-12">
          <ErrorSummary problems={form.problems} attempt={form.attempt} />
          <PreviewHead upload={upload} preview={preview} hasErrors={form.problems.length > 0} />
        </div>
        <RecordStrip
          preview={preview}
          bands={bands}
          unit={shop.unit}
          spans={typed.spans.map(keptSpan)}
          onMove={(index, end, timeS) =>
            form.setValue(`spans.${index}.${end}`, formatRunTime(timeS), {
              shouldValidate: form.attempt > 0,
            })
          }
        />
        <div className="grid gap-x-12 gap-y-9 px-4 pt-6 pb-12 desk:grid-cols-2 desk:px-12">
          <HowItWasRead upload={upload} preview={preview} />
          <TellOfIt form={form} preview={preview} firstRun={firstRun} />
        </div>
      </form>
    </SitePage>
  );
}

function keptSpan({ label, fromS, toS }: AcceptForm['spans'][number]): KeptSpan | null {
  const from = parseRunTime(fromS);
  const to = parseRunTime(toS);
  if (from === null || to === null || to <= from) return null;
  return { label: label || 'the run', fromS: from, toS: to };
}

type DecideProps = {
  form: { isSaving: boolean };
  count: number;
  onLeave: () => Promise<void>;
};

function Decide({ form, count, onLeave }: DecideProps) {
  const [isLeaving, setIsLeaving] = useState(false);
  const [isBusy, setIsBusy] = useState(false);

  async function handleLeave() {
    setIsBusy(true);
    try {
      await onLeave();
    } finally {
      setIsBusy(false);
      setIsLeaving(false);
    }
  }

  return (
    <Deck>
      <Key
        type="submit"
        form="accept-form"
        face="main"
        size="site"
        className="flex-1 desk:min-w-64 desk:flex-none"
        disabled={form.isSaving}
      >
        {form.isSaving ? 'Judging…' : acceptWords(count)}
      </Key>
      <Key size="site" className="flex-1 desk:flex-none" onClick={() => setIsLeaving(true)}>
        Throw it away
      </Key>
      {isLeaving && (
        <Slip
          question="Throw this file away?"
          doer="Throw it away"
          isStop
          isBusy={isBusy}
          onDo={() => void handleLeave()}
          onBack={() => setIsLeaving(false)}
        >
          No run is made, and nothing of the file stays here. Your own copy is not touched.
        </Slip>
      )}
    </Deck>
  );
}

function acceptWords(count: number) {
  return count === 1 ? 'Accept and judge' : `Accept ${count} runs`;
}
