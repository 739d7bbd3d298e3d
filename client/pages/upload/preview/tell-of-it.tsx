import type { ReadPreview } from '#shared/schemas/uploads.ts';
import { SectionHead } from '../../../components/section-head.tsx';
import { formatRunTime } from '../run-time.ts';
import { ConditionsForm } from './conditions-form.tsx';
import { MarksForm } from './marks-form.tsx';
import { SpansForm } from './spans-form.tsx';
import type { UploadForm } from './upload-form.ts';

type TellOfItProps = { form: UploadForm; preview: ReadPreview; firstRun: number };

/** What only the technician knows. */
export function TellOfIt({ form, preview, firstRun }: TellOfItProps) {
  return (
    <div className="grid content-start gap-9">
      <section aria-labelledby="spans">
        <SectionHead site id="spans" state={`${formatRunTime(preview.durationS)} in all`}>
          What becomes a run
        </SectionHead>
        <div className="pt-2">
          <SpansForm form={form} preview={preview} firstRun={firstRun} />
        </div>
      </section>
      <section aria-labelledby="conditions">
        <SectionHead site id="conditions">
          How it was made
        </SectionHead>
        <div className="pt-2">
          <ConditionsForm form={form} />
        </div>
      </section>
      <section aria-labelledby="marks">
        <SectionHead site id="marks" state="none needed">
          Marks
        </SectionHead>
        <div className="pt-2">
          <MarksForm form={form} />
        </div>
      </section>
    </div>
  );
}
