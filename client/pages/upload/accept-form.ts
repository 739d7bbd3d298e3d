import { z } from 'zod';
import { markSchema, runConditionsSchema, runSpanSchema } from '#shared/schemas/runs.ts';
import type { AcceptUpload } from '#shared/schemas/runs.ts';
import type { ReadPreview, Upload } from '#shared/schemas/uploads.ts';
import { formatRunTime, parseRunTime } from './run-time.ts';

const typedTimeSchema = z.string().transform((typed, context) => {
  const timeS = parseRunTime(typed);
  if (timeS !== null) return timeS;
  context.addIssue({ code: 'custom', message: 'Write minutes and seconds, like 3:47' });
  return z.NEVER;
});

const typedNumberSchema = z.string().transform((typed, context) => {
  const text = typed.trim().replace(',', '.');
  if (text === '') return null;
  if (/^[-−]?\d+(\.\d+)?$/.test(text)) return Number(text.replace('−', '-'));
  context.addIssue({ code: 'custom', message: 'Enter a number, like 70' });
  return z.NEVER;
});

/** A choice that nobody made yet is the empty word: it is asked for, never assumed. */
function chosen<Choice extends string>(choices: z.ZodType<Choice>, ask: string) {
  return z.string().transform((value, context) => {
    const choice = choices.safeParse(value);
    if (choice.success) return choice.data;
    context.addIssue({ code: 'custom', message: ask });
    return z.NEVER;
  });
}

const conditions = runConditionsSchema.shape;

/** What is typed on the upload page, checked with the parts of the schema that the server uses. */
export function acceptFormSchema(durationS: number) {
  const withinSchema = typedTimeSchema.refine(
    (timeS) => timeS <= durationS + 0.1,
    `The record ends at ${formatRunTime(durationS)}`,
  );
  return z.object({
    placement: conditions.placement,
    duct: chosen(conditions.duct, 'Say whether the duct was on or off'),
    load: chosen(conditions.load, 'Say what was in the drum'),
    setting: chosen(conditions.setting, 'Say which heat setting it ran on'),
    roomTemp: typedNumberSchema.pipe(conditions.roomTemp),
    roomUnit: conditions.roomUnit,
    probeId: z
      .string()
      .transform((id) => id || null)
      .pipe(conditions.probeId),
    marks: z
      .array(
        z.object({
          time: withinSchema,
          kind: markSchema.shape.kind,
          text: markSchema.shape.text.unwrap(),
        }),
      )
      .max(500),
    spans: z
      .array(
        z
          .object({ from: withinSchema, to: withinSchema, label: runSpanSchema.shape.label })
          .refine(({ from, to }) => to > from, { path: ['to'], message: 'End after it starts' }),
      )
      .min(1)
      .max(20, 'At most 20 runs'),
  });
}

export type AcceptForm = z.input<ReturnType<typeof acceptFormSchema>>;
export type CheckedForm = z.output<ReturnType<typeof acceptFormSchema>>;

/** Nothing that bears on the judgement is filled in for the technician but what the shop already knows. */
export function emptyForm(preview: ReadPreview, roomUnit: 'F' | 'C', firstRun: number): AcceptForm {
  return {
    placement: '',
    duct: '',
    load: '',
    setting: '',
    roomTemp: '',
    roomUnit,
    probeId: '',
    marks: [],
    spans: [wholeSpan(preview.durationS, firstRun)],
  };
}

export function wholeSpan(durationS: number, number: number): AcceptForm['spans'][number] {
  return { from: '0:00', to: formatRunTime(durationS), label: `Run ${number}` };
}

/** The proposed parts as spans, named in order. */
export function partSpans(parts: ReadPreview['parts'], firstRun: number): AcceptForm['spans'] {
  return parts.map(({ fromS, toS }, index) => ({
    from: formatRunTime(fromS),
    to: formatRunTime(toS),
    label: `Run ${firstRun + index}`,
  }));
}

/** What goes to the server. Times shown to a tenth are let reach the record's own end. */
export function toAcceptUpload(
  form: CheckedForm,
  upload: Upload,
  preview: ReadPreview,
): AcceptUpload {
  const { marks, spans, ...conditionsOnly } = form;
  return {
    visitId: upload.visitId,
    resultHash: preview.resultHash,
    conditions: conditionsOnly,
    marks: marks.map(({ time, kind, text }) => ({
      timeS: Math.min(time, preview.durationS),
      kind,
      ...(text && { text }),
    })),
    spans: spans.map(({ from, to, label }) => ({
      fromS: from,
      toS: preview.durationS - to < 0.1 ? preview.durationS : to,
      label,
    })),
    startedAtMs: null,
  };
}
