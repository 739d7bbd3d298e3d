import { useQuery } from '@tanstack/react-query';
import { HEAT_SETTINGS } from '#shared/schemas/homes.ts';
import { probesQuery } from '../../../api/probes.ts';
import { Cells, PickField, SelectField, TextField } from '../../../components/field.tsx';
import { unitWords } from '../../../format/rating-words.ts';
import type { AcceptForm } from '../accept-form.ts';
import type { UploadForm } from './upload-form.ts';

const PLACEMENTS = [
  'At the exhaust outlet',
  'In the duct behind the machine',
  'At the hood outside',
];
const HEAT_WORDS = { high: 'High', medium: 'Medium', low: 'Low' };

type Condition = keyof AcceptForm['conditions'];

/** How the run was made: what the judgement and whoever reads it later rest on. */
export function ConditionsForm({ form }: { form: UploadForm }) {
  const field = (name: Condition) => ({
    ...form.register(`conditions.${name}`),
    error: form.fault(`conditions.${name}`),
  });
  return (
    <Cells className="grid-cols-2">
      <ProbeField {...field('probeId')} />
      <TextField
        label="Where the probe sat"
        className="col-span-2"
        list="placements"
        autoComplete="off"
        {...field('placement')}
      />
      <datalist id="placements">
        {PLACEMENTS.map((placement) => (
          <option key={placement} value={placement} />
        ))}
      </datalist>
      <PickField
        label="Duct"
        className="col-span-2 min-[440px]:col-span-1"
        options={[
          { value: 'on', words: 'On' },
          { value: 'off', words: 'Off' },
        ]}
        {...field('duct')}
      />
      <PickField
        label="Drum"
        className="col-span-2 min-[440px]:col-span-1"
        options={[
          { value: 'empty', words: 'Empty' },
          { value: 'damp', words: 'Damp load' },
        ]}
        {...field('load')}
      />
      <PickField
        label="Heat setting"
        className="col-span-2"
        options={HEAT_SETTINGS.map((value) => ({ value, words: HEAT_WORDS[value] }))}
        {...field('setting')}
      />
      <TextField
        label="Room temperature, if read"
        inputMode="decimal"
        autoComplete="off"
        {...field('roomTemp')}
      />
      <SelectField label="In" {...field('roomUnit')}>
        {(['F', 'C', 'K'] as const).map((unit) => (
          <option key={unit} value={unit}>
            {unitWords(unit)}
          </option>
        ))}
      </SelectField>
    </Cells>
  );
}

type ProbeFieldProps = ReturnType<UploadForm['register']> & { error: string | undefined };

/** A list that could not be fetched must not stop the work: the run then goes without its probe. */
function ProbeField(field: ProbeFieldProps) {
  const probes = useQuery(probesQuery());
  return (
    <SelectField
      label="Probe"
      className="col-span-2"
      hint={
        probes.isError
          ? `The probes could not be fetched. ${probes.error.message}`
          : 'Its accuracy goes into every call.'
      }
      {...field}
    >
      <option value="">{probes.isPending ? 'Fetching the probes…' : 'Not one of the list'}</option>
      {probes.data?.map(({ id, name, accuracy, unit }) => (
        <option key={id} value={id}>
          {name}, ±{accuracy} {unitWords(unit)}
        </option>
      ))}
    </SelectField>
  );
}
