import { useFieldArray } from 'react-hook-form';
import { MARK_KINDS } from '#shared/schemas/runs.ts';
import { MARK_WORDS } from '../../../chart/strip-of-run.ts';
import { Cells, SelectField, TextField } from '../../../components/field.tsx';
import { Key, Word } from '../../../components/key.tsx';
import type { UploadForm } from './upload-form.ts';

/** What was seen or heard during the run, each at its time. */
export function MarksForm({ form }: { form: UploadForm }) {
  const { fields, append, remove } = useFieldArray({ control: form.control, name: 'marks' });
  return (
    <>
      <p className="pb-3 text-[1rem]">
        A click heard, the heat turned off, the door opened: each with its time of the run. A turn
        made by hand is then not taken for the thermostat’s.
      </p>
      <div className="grid gap-3">
        {fields.map((field, index) => (
          <MarkCells key={field.id} form={form} index={index} onRemove={() => remove(index)} />
        ))}
      </div>
      <Key
        size="site"
        className={fields.length > 0 ? 'mt-3' : ''}
        onClick={() => append({ timeS: '', kind: 'click', text: '' }, { shouldFocus: false })}
      >
        Add a mark
      </Key>
    </>
  );
}

type MarkCellsProps = { form: UploadForm; index: number; onRemove: () => void };

function MarkCells({ form, index, onRemove }: MarkCellsProps) {
  const name = (part: 'timeS' | 'kind' | 'text') => `marks.${index}.${part}` as const;
  const field = (part: 'timeS' | 'kind' | 'text') => ({
    ...form.register(name(part)),
    error: form.fault(name(part)),
  });
  return (
    <fieldset>
      <legend className="sr-only">Mark {index + 1}</legend>
      <Cells className="grid-cols-[minmax(0,1fr)_minmax(0,2fr)]">
        <TextField label="Time" placeholder="3:47" autoComplete="off" {...field('timeS')} />
        <SelectField label="What" {...field('kind')}>
          {MARK_KINDS.map((kind) => (
            <option key={kind} value={kind}>
              {MARK_WORDS[kind]}
            </option>
          ))}
        </SelectField>
        <TextField
          label="In words, where it needs any"
          className="col-span-2"
          autoComplete="off"
          {...field('text')}
        />
      </Cells>
      <Word onClick={onRemove}>Take mark {index + 1} out</Word>
    </fieldset>
  );
}
