import type { ChangeEvent } from 'react';
import {
  useWatch,
  type Control,
  type UseFormRegister,
  type UseFormSetValue,
} from 'react-hook-form';
import { RATING_KINDS, type NewRating } from '#shared/schemas/ratings.ts';
import { Cells, PickField, SelectField, TextField } from '../../components/field.tsx';
import { typedNumber } from '../../forms/typed-number.ts';
import { RATING_KIND_WORDS, unitWords } from '../../format/rating-words.ts';

type RatingCellsForm = {
  register: UseFormRegister<NewRating>;
  fault: (name: keyof NewRating) => string | undefined;
  control: Control<NewRating, unknown, NewRating>;
  setValue: UseFormSetValue<NewRating>;
};

const UNITS = [
  { value: 'F', words: '°F' },
  { value: 'C', words: '°C' },
];
/** These cut the heat for good: they have no second figure. */
const ONE_SHOT: NewRating['kind'][] = ['thermal-cut-off', 'thermal-fuse'];

export function RatingCells({ form }: { form: RatingCellsForm }) {
  const { register, fault, control } = form;
  const [kind, unit] = useWatch({ control, name: ['kind', 'unit'] });
  const isOneShot = ONE_SHOT.includes(kind);
  const dropCloses = (event: ChangeEvent<HTMLSelectElement>) => {
    if (!ONE_SHOT.some((oneShot) => oneShot === event.target.value)) return;
    form.setValue('closes', null);
    form.setValue('closesTol', null);
  };
  return (
    <Cells className="grid-cols-[2fr_1fr]">
      <TextField
        label="Name or part number"
        {...register('name')}
        error={fault('name')}
        autoComplete="off"
        className="col-span-2"
      />
      <SelectField
        label="Kind"
        {...register('kind', { onChange: dropCloses })}
        error={fault('kind')}
        className="col-span-2 desk:col-span-1"
      >
        {RATING_KINDS.map((each) => (
          <option key={each} value={each}>
            {RATING_KIND_WORDS[each]}
          </option>
        ))}
      </SelectField>
      <PickField
        label="Figures in"
        options={UNITS}
        {...register('unit')}
        error={fault('unit')}
        className="col-span-2 desk:col-span-1"
      />
      <FigureCell
        form={form}
        name="opens"
        label={`Opens, ${unitWords(unit)}`}
        hint="where the heat should stop"
      />
      <FigureCell form={form} name="opensTol" label={`± ${unitWords(unit)}`} />
      {!isOneShot && (
        <>
          <FigureCell
            form={form}
            name="closes"
            label={`Closes, ${unitWords(unit)}`}
            hint="where the heat should come back"
          />
          <FigureCell form={form} name="closesTol" label={`± ${unitWords(unit)}`} />
        </>
      )}
      <FigureCell form={form} name="overshoot" label={`Air may run over by, ${unitWords(unit)}`} />
      <FigureCell form={form} name="undershoot" label={`under by, ${unitWords(unit)}`} />
    </Cells>
  );
}

type FigureCellProps = {
  form: RatingCellsForm;
  name: 'opens' | 'opensTol' | 'closes' | 'closesTol' | 'overshoot' | 'undershoot';
  label: string;
  hint?: string;
};

function FigureCell({ form: { register, fault }, name, label, hint }: FigureCellProps) {
  return (
    <TextField
      label={label}
      inputMode="decimal"
      autoComplete="off"
      {...register(name, typedNumber)}
      error={fault(name)}
      {...(hint !== undefined && { hint })}
    />
  );
}
