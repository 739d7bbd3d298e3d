import { useFieldArray } from 'react-hook-form';
import type { ReadPreview } from '#shared/schemas/uploads.ts';
import { Cells, TextField } from '../../../components/field.tsx';
import { Key, Word } from '../../../components/key.tsx';
import { Notice } from '../../../components/notice.tsx';
import { partSpans, wholeSpan, type TypedSpan } from '../accept-form.ts';
import { formatRunTime, parseRunTime } from '../run-time.ts';
import type { UploadForm } from './upload-form.ts';

type SpansFormProps = { form: UploadForm; preview: ReadPreview; firstRun: number };

/** Which part of the record becomes a run: the whole, one part of it, or several. */
export function SpansForm({ form, preview, firstRun }: SpansFormProps) {
  const { fields, append, update, remove, replace } = useFieldArray({
    control: form.control,
    name: 'spans',
  });
  const { parts, durationS } = preview;
  const isWhole = fields.length === 1;

  /** The last run is cut in the middle: both halves can then be moved. */
  function handleSplit(last: TypedSpan, index: number) {
    const fromS = parseRunTime(last.fromS) ?? 0;
    const toS = parseRunTime(last.toS) ?? durationS;
    const middle = formatRunTime(Math.round((fromS + toS) / 2));
    update(index, { ...last, toS: middle });
    append(
      { label: `Run ${firstRun + fields.length}`, fromS: middle, toS: last.toS },
      { shouldFocus: false },
    );
  }

  return (
    <>
      {parts.length > 1 && isWhole && (
        <Notice head={`The record pauses. It looks like ${parts.length} runs.`} className="mb-3">
          <p>{parts.map(partWords).join('; ')}.</p>
          <div className="pt-3">
            <Key size="site" onClick={() => replace(partSpans(parts, firstRun))}>
              Split into {parts.length} runs
            </Key>
          </div>
        </Notice>
      )}
      <div className="grid gap-3">
        {fields.map((field, index) => (
          <SpanCells key={field.id} form={form} index={index}>
            {!isWhole && <Word onClick={() => remove(index)}>Leave this part out</Word>}
          </SpanCells>
        ))}
      </div>
      <div className="flex flex-wrap gap-x-5">
        <Word
          onClick={() => {
            const index = fields.length - 1;
            const last = form.getValues(`spans.${index}`);
            handleSplit(last, index);
          }}
        >
          {isWhole ? 'Split it in two' : 'Split the last one'}
        </Word>
        {!isWhole && (
          <Word onClick={() => replace([wholeSpan(durationS, firstRun)])}>Keep it whole</Word>
        )}
      </div>
    </>
  );
}

function partWords({ fromS, toS }: { fromS: number; toS: number }) {
  return `${formatRunTime(fromS)} to ${formatRunTime(toS)}`;
}

type SpanCellsProps = { form: UploadForm; index: number; children: React.ReactNode };

function SpanCells({ form, index, children }: SpanCellsProps) {
  const name = (part: 'label' | 'fromS' | 'toS') => `spans.${index}.${part}` as const;
  const field = (part: 'label' | 'fromS' | 'toS') => ({
    ...form.register(name(part)),
    error: form.fault(name(part)),
  });
  return (
    <fieldset>
      <legend className="sr-only">Run {index + 1} of this file</legend>
      <Cells className="grid-cols-2 min-[440px]:grid-cols-[minmax(0,2fr)_minmax(0,1fr)_minmax(0,1fr)]">
        <TextField
          label="Name of the run"
          className="col-span-2 min-[440px]:col-span-1"
          {...field('label')}
        />
        <TextField label="From" inputMode="text" {...field('fromS')} />
        <TextField label="To" inputMode="text" {...field('toS')} />
      </Cells>
      {children}
    </fieldset>
  );
}
