import { useWatch } from 'react-hook-form';
import { classAccuracy, classesOf, type ProbeClass } from '#shared/probes/probe-class.ts';
import { JUDGED_ABOUT_C } from '#shared/probes/probe-in-use.ts';
import { sensorOf } from '#shared/probes/sensor-of.ts';
import { fromKelvinStep, type DisplayUnit } from '#shared/units.ts';
import { formatRated, formatStep } from '#shared/wording/format.ts';
import { SelectField } from '../../components/field.tsx';
import { Word } from '../../components/key.tsx';
import { PROBE_CLASS_WORDS } from '../../format/calibration-words.ts';
import type { ProbeForm } from './use-probe-form.ts';

const NO_CLASS = { setValueAs: (chosen: unknown) => (chosen === '' ? null : chosen) };

/** The class of a thermocouple or a Pt100, and the accuracy that it stands for where runs are judged. */
export function ClassField({ form }: { form: ProbeForm }) {
  const { register, fault, control, setValue } = form;
  const [kind, chosen, unit] = useWatch({ control, name: ['kind', 'accuracyClass', 'unit'] });
  const sensor = sensorOf(kind);
  if (!sensor) return null;
  const classes = classesOf(sensor);
  const isOwn = chosen !== null && classes.includes(chosen);
  return (
    <div className="col-span-2 bg-strip">
      <SelectField
        label="Class"
        {...register('accuracyClass', NO_CLASS)}
        error={fault('accuracyClass')}
      >
        <option value="">None stated</option>
        {classes.map((name) => (
          <option key={name} value={name}>
            {PROBE_CLASS_WORDS[name]}
          </option>
        ))}
      </SelectField>
      {isOwn && (
        <Proposal
          halfK={classAccuracy(sensor, chosen, Math.min(JUDGED_ABOUT_C, reachC(chosen)))}
          unit={unit}
          onTake={(accuracy) => setValue('accuracy', accuracy, { shouldDirty: true })}
        />
      )}
    </div>
  );
}

/** Class 3 is for the cold: it ends at 40 °C. */
function reachC(name: ProbeClass): number {
  return name === 'iec-3' ? 40 : Infinity;
}

type ProposalProps = { halfK: number; unit: DisplayUnit; onTake: (accuracy: number) => void };

function Proposal({ halfK, unit, onTake }: ProposalProps) {
  const accuracy = Math.round(fromKelvinStep(halfK, unit) * 100) / 100;
  return (
    <p className="flex flex-wrap items-baseline gap-x-3 px-3 pb-1 text-small text-print">
      <span>
        ±{'\u00a0'}
        {formatStep(halfK, unit)} at {formatRated(JUDGED_ABOUT_C, unit)}, the sensor alone.
      </span>
      <Word onClick={() => onTake(accuracy)}>Take it as the accuracy</Word>
    </p>
  );
}
