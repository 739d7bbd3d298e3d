import { z } from 'zod';
import { markSchema, runConditionsSchema } from '#shared/schemas/runs.ts';
import type { AcceptForm } from './accept-form.ts';

const typed = z.string();

/** What was typed about a staged file, kept in this tab: a reload or another reading of the file loses nothing. */
const draftSchema = z.object({
  resultHash: z.string(),
  form: z.object({
    spans: z.array(z.object({ label: typed, fromS: typed, toS: typed })).min(1),
    conditions: z.object({
      probeId: typed,
      placement: typed,
      duct: typed,
      load: typed,
      setting: typed,
      roomTemp: typed,
      roomUnit: runConditionsSchema.shape.roomUnit,
    }),
    marks: z.array(z.object({ timeS: typed, kind: markSchema.shape.kind, text: typed })),
  }),
});
export type UploadDraft = z.infer<typeof draftSchema>;

function keyOf(uploadId: string): string {
  return `upload-${uploadId}`;
}

export function saveDraft(uploadId: string, draft: UploadDraft): void {
  sessionStorage.setItem(keyOf(uploadId), JSON.stringify(draft));
}

export function loadDraft(uploadId: string): UploadDraft | null {
  const stored = sessionStorage.getItem(keyOf(uploadId));
  if (stored === null) return null;
  const draft = draftSchema.safeParse(JSON.parse(stored));
  return draft.success ? draft.data : null;
}

export function dropDraft(uploadId: string): void {
  sessionStorage.removeItem(keyOf(uploadId));
}

/** The form as it was left. Spans belong to one reading of the file: where it is read otherwise, they start anew. */
export function withDraft(
  form: AcceptForm,
  draft: UploadDraft | null,
  resultHash: string,
): AcceptForm {
  if (!draft) return form;
  const spans = draft.resultHash === resultHash ? draft.form.spans : form.spans;
  return { ...draft.form, spans };
}
