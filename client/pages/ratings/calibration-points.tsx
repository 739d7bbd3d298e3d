import { Cells, TextField } from '../../components/field.tsx';
import type { FormPart } from '../../forms/use-checked-form.ts';
import { boilingOf } from '#shared/probes/calibrate-probe.ts';
import type { DisplayUnit } from '#shared/units.ts';
import { formatStep } from '#shared/wording/format.ts';
import { REFERENCE_ROWS } from './typed-calibration.ts';

/** Boiling point known by the altitude alone, near sea level: k = 2, K. */
const WEATHER_UK = 2 * boilingOf({ pressureHPa: null, altitudeM: 0 }).errorK;

type Named = `points.${number}.reference` | `points.${number}.readings`;
type Bath = 'pressureHPa' | 'altitudeM';
type Reference = 'referenceName' | 'referenceU';

/** Ice, boiling water, and what the water's boiling point goes by. */
export function BathCells({
  form: { register, fault },
  unit,
}: {
  form: FormPart<Named | Bath>;
  unit: DisplayUnit;
}) {
  const readings = (i: number, label: string, hint: string) => (
    <TextField
      label={label}
      autoComplete="off"
      {...register(`points.${i}.readings`)}
      error={fault(`points.${i}.readings`)}
      hint={hint}
      className="col-span-2"
    />
  );
  return (
    <Cells className="grid-cols-2">
      {readings(
        0,
        `In ice, it reads, °${unit}`,
        'Crushed ice and water, stirred. Several readings, parted by spaces, are better than one.',
      )}
      {readings(
        1,
        `In boiling water, it reads, °${unit}`,
        'A rolling boil, the tip off the bottom.',
      )}
      <TextField
        label="Air pressure there, hPa"
        inputMode="decimal"
        {...register('pressureHPa')}
        error={fault('pressureHPa')}
        hint="As a barometer shows it on the spot, not reduced to sea level. 1 inHg is 33.86 hPa."
        className="max-desk:col-span-2"
      />
      <TextField
        label={`Or the altitude, ${unit === 'F' ? 'ft' : 'm'}`}
        inputMode="decimal"
        {...register('altitudeM')}
        error={fault('altitudeM')}
        hint={`Weather then leaves the boiling point uncertain by ±\u00a0${formatStep(WEATHER_UK, unit)}.`}
        className="max-desk:col-span-2"
      />
    </Cells>
  );
}

/** Points beside a reference thermometer; as many rows as are needed. */
export function ReferenceCells({
  form: { register, fault },
  unit,
}: {
  form: FormPart<Named | Reference>;
  unit: DisplayUnit;
}) {
  return (
    <>
      <Cells className="mb-4 grid-cols-2">
        <TextField
          label="Reference thermometer"
          autoComplete="off"
          {...register('referenceName')}
          error={fault('referenceName')}
          hint="Its name or number"
          className="max-desk:col-span-2"
        />
        <TextField
          label={`Its uncertainty, ± °${unit}`}
          inputMode="decimal"
          {...register('referenceU')}
          error={fault('referenceU')}
          hint="k = 2, from its certificate"
          className="max-desk:col-span-2"
        />
      </Cells>
      <Cells className="grid-cols-[minmax(0,1fr)_minmax(0,1.6fr)]">
        {Array.from({ length: REFERENCE_ROWS }, (_, i) => (
          <PointCells key={i} i={i} unit={unit} form={{ register, fault }} />
        ))}
      </Cells>
      <p className="pt-2 text-small text-print">
        Both in the same stirred bath, once they stand still. Spread the points over the
        temperatures that runs are judged at.
      </p>
    </>
  );
}

function PointCells({
  i,
  unit,
  form: { register, fault },
}: {
  i: number;
  unit: DisplayUnit;
  form: FormPart<Named>;
}) {
  return (
    <>
      <TextField
        label={`Reference ${i + 1}, °${unit}`}
        inputMode="decimal"
        autoComplete="off"
        {...register(`points.${i}.reference`)}
        error={fault(`points.${i}.reference`)}
      />
      <TextField
        label={`It reads, °${unit}`}
        autoComplete="off"
        {...register(`points.${i}.readings`)}
        error={fault(`points.${i}.readings`)}
      />
    </>
  );
}
