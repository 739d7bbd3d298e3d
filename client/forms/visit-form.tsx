import { useQuery } from '@tanstack/react-query';
import { z } from 'zod';
import type { NewVisit } from '#shared/schemas/jobs.ts';
import { words } from '#shared/schemas/primitives.ts';
import { techniciansQuery } from '../api/people.ts';
import { Cells, SelectField, TextAreaField, TextField } from '../components/field.tsx';
import { dayOf, instantAt } from '../format/when.ts';
import type { FormPart } from './use-checked-form.ts';

/** A visit as it is typed: a day and two clocks in the shop's zone. */
export const typedVisitSchema = z
  .object({
    technicianId: z.string().min(1, 'Choose a technician'),
    day: z.string().min(1, 'Enter the day'),
    from: z.string().regex(/^\d\d:\d\d$/, 'Enter when it starts'),
    to: z.string().regex(/^\d\d:\d\d$/, 'Enter when it ends'),
    notes: words(2000),
  })
  .refine(({ from, to }) => to > from, { path: ['to'], message: 'End the visit after it starts' });
export type TypedVisit = z.input<typeof typedVisitSchema>;

export function blankVisit(zone: string): TypedVisit {
  return { technicianId: '', day: dayOf(Date.now(), zone), from: '', to: '', notes: '' };
}

/** What crosses the wire; null where the day or a clock cannot be read. */
export function visitOf(typed: TypedVisit, zone: string): NewVisit | null {
  const startsAtMs = instantAt(typed.day, typed.from, zone);
  const endsAtMs = instantAt(typed.day, typed.to, zone);
  if (startsAtMs === null || endsAtMs === null) return null;
  return { technicianId: typed.technicianId, startsAtMs, endsAtMs, notes: typed.notes };
}

/** The server names a visit's fields in its own words; here they land on the cells as typed. */
export const VISIT_FIELDS = { startsAtMs: 'from', endsAtMs: 'to' };

export function VisitCells({ form }: { form: FormPart<keyof TypedVisit> }) {
  const { register, fault } = form;
  const technicians = useQuery(techniciansQuery());
  return (
    <Cells className="grid-cols-2">
      <SelectField
        label="Technician"
        {...register('technicianId')}
        error={fault('technicianId') ?? technicians.error?.message}
        hint={technicians.data?.length === 0 && 'None yet. The owner adds people on the Shop page.'}
        className="col-span-2"
      >
        <option value="">Choose a technician</option>
        {technicians.data?.map(({ id, name }) => (
          <option key={id} value={id}>
            {name}
          </option>
        ))}
      </SelectField>
      <TextField
        label="Day"
        type="date"
        {...register('day')}
        error={fault('day')}
        className="col-span-2"
      />
      <TextField label="From" type="time" step={300} {...register('from')} error={fault('from')} />
      <TextField label="To" type="time" step={300} {...register('to')} error={fault('to')} />
      <TextAreaField
        label="What to bring, what to know"
        {...register('notes')}
        error={fault('notes')}
        rows={2}
        className="col-span-2"
      />
    </Cells>
  );
}
