import { z } from 'zod';
import { markSchema, runConditionsSchema, runSpanSchema } from '#shared/schemas/runs.ts';
import type { AcceptUpload } from '#shared/schemas/runs.ts';
import type { ReadPreview, Upload } from '#shared/schemas/uploads.ts';
import { formatRunTime, parseRunTime } from './run-time.ts';

/** Times are typed and shown to a tenth of a second; the record itself ends where it ends. */
const SHOWN_TO_S = 0.1;

const typedTimeSchema = z.string().transform((typed, context) => {
  const timeS = parseRunTime(typed);
  if (timeS !== null) return timeS;
  context.addIssue({ code: 'custom', message: 'Write minutes and seconds, like 3:47' });
  return z.NEVER;
});

const typedNumberSchema = z.string().transform((typed, context) => {
  const text = typed.trim().replace(',', '.').replace('−', '-');
  if (text === '') return null;
  if (/^-?\d+(\.\d+)?$/.test(text)) return Number(text);
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

const typedConditionsSchema = z.object({
  probeId: z
    .string()
    .transform((id) => id || null)
    .pipe(conditions.probeId),
  placement: conditions.placement,
  duct: chosen(conditions.duct, 'Say whether the duct was on or off'),
  load: chosen(conditions.load, 'Say what was in the drum'),
  setting: chosen(conditions.setting, 'Say which heat setting it ran on'),
  roomTemp: typedNumberSchema.pipe(conditions.roomTemp),
  roomUnit: conditions.roomUnit,
});

/**
 * What is typed on the upload page, checked with the parts of the schema that the server checks with. Its fields are
 * called as on the wire, so that a fault that only the server sees lands on its field as well.
 */
export function acceptFormSchema(durationS: number) {
  const withinSchema = typedTimeSchema.refine(
    (timeS) => timeS <= durationS + SHOWN_TO_S,
    `The record ends at ${formatRunTime(durationS)}`,
  );
  const typedSpanSchema = z
    .object({ label: runSpanSchema.shape.label, fromS: withinSchema, toS: withinSchema })
    .refine(({ fromS, toS }) => toS > fromS, { path: ['toS'], message: 'End after it starts' });
  const typedMarkSchema = z.object({
    timeS: withinSchema,
    kind: markSchema.shape.kind,
    text: markSchema.shape.text.unwrap(),
  });
  return z.object({
    spans: z.array(typedSpanSchema).min(1).max(20, 'At most 20 runs from one file'),
    conditions: typedConditionsSchema,
    marks: z.array(typedMarkSchema).max(500, 'At most 500 marks'),
  });
}

export type AcceptForm = z.input<ReturnType<typeof acceptFormSchema>>;
export type CheckedForm = z.output<ReturnType<typeof acceptFormSchema>>;
export type TypedSpan = AcceptForm['spans'][number];

/** Nothing that bears on the judgement is filled in for the technician. */
export function emptyForm(preview: ReadPreview, roomUnit: 'F' | 'C', firstRun: number): AcceptForm {
  return {
    spans: [wholeSpan(preview.durationS, firstRun)],
    conditions: {
      probeId: '',
      placement: '',
      duct: '',
      load: '',
      setting: '',
      roomTemp: '',
      roomUnit,
    },
    marks: [],
  };
}

export function wholeSpan(durationS: number, number: number): TypedSpan {
  return { label: `Run ${number}`, fromS: '0:00', toS: formatRunTime(durationS) };
}

/** The proposed parts as spans, named in order. */
export function partSpans(parts: ReadPreview['parts'], firstRun: number): TypedSpan[] {
  return parts.map(({ fromS, toS }, index) => ({
    label: `Run ${firstRun + index}`,
    fromS: formatRunTime(fromS),
    toS: formatRunTime(toS),
  }));
}

/** What goes to the server. */
export function toAcceptUpload(
  form: CheckedForm,
  upload: Upload,
  preview: ReadPreview,
): AcceptUpload {
  const { durationS, resultHash } = preview;
  const toEnd = (timeS: number) => (durationS - timeS < SHOWN_TO_S ? durationS : timeS);
  return {
    visitId: upload.visitId,
    resultHash,
    conditions: form.conditions,
    marks: form.marks.map(({ timeS, kind, text }) => ({
      timeS: Math.min(timeS, durationS),
      kind,
      ...(text && { text }),
    })),
    spans: form.spans.map((span) => ({ ...span, toS: toEnd(span.toS) })),
    startedAtMs: null,
  };
}
