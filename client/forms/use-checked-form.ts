import { zodResolver } from '@hookform/resolvers/zod';
import { useState } from 'react';
import {
  useForm,
  type DefaultValues,
  type FieldErrors,
  type FieldValues,
  type Path,
  type UseFormRegisterReturn,
} from 'react-hook-form';
import type { z } from 'zod';
import { ApiError } from '../api/http.ts';
import type { FormProblem } from '../components/error-summary.tsx';

type CheckedFormOptions<In extends FieldValues, Out> = {
  schema: z.ZodType<Out, In>;
  defaultValues: DefaultValues<In>;
  /** Sends what was typed. A refusal that names fields lands on them; any other stands above the form. */
  save: (values: Out) => Promise<unknown>;
  /** Where a field is called otherwise by the server: its name there to its name here. */
  fieldNames?: Record<string, string>;
  /** What a figure is, so that "Enter a number" says of what: "the temperature it opens at". */
  figures?: Partial<Record<string, string>>;
};

/**
 * A form over a shared schema. Checked when it is sent and, from then on, as it is put right; what was typed stays
 * whatever the server says.
 */
export function useCheckedForm<In extends FieldValues, Out>({
  schema,
  defaultValues,
  save,
  fieldNames = {},
  figures = {},
}: CheckedFormOptions<In, Out>) {
  const form = useForm<In, unknown, Out>({
    resolver: zodResolver(schema),
    defaultValues,
    shouldFocusError: false,
  });
  const [refusal, setRefusal] = useState<string | null>(null);
  const { errors, isSubmitting, submitCount } = form.formState;

  const handleSubmit = form.handleSubmit(
    async (values) => {
      setRefusal(null);
      try {
        await save(values);
      } catch (error) {
        if (!(error instanceof ApiError)) throw error;
        const faulty = Object.entries(error.fields);
        for (const [name, message] of faulty) {
          form.setError((fieldNames[name] ?? name) as Path<In>, { message });
        }
        if (faulty.length === 0) setRefusal(error.message);
      }
    },
    () => setRefusal(null),
  );

  const problems = problemsOf(errors, refusal).map((problem) => sayOfWhat(problem, figures));
  return {
    register: form.register,
    setValue: form.setValue,
    reset: form.reset,
    getValues: form.getValues,
    control: form.control,
    handleSubmit,
    isSaving: isSubmitting,
    attempt: submitCount,
    problems,
    /** What is wrong with a field, in words. */
    fault: (name: Path<In>) => problems.find((problem) => problem.name === name)?.message,
  };
}

/** What a set of cells needs of the form it is part of. */
export type FormPart<Name extends string> = {
  register: (name: Name) => UseFormRegisterReturn;
  fault: (name: Name) => string | undefined;
};

/** Every fault of a form, in the order of its fields, then the refusal that belongs to none. */
export function problemsOf(errors: FieldErrors, refusal: string | null): FormProblem[] {
  const problems = listFaults(errors, '');
  return refusal === null ? problems : [...problems, { name: null, message: refusal }];
}

function listFaults(errors: FieldErrors, prefix: string): FormProblem[] {
  return Object.entries(errors).flatMap(([key, error]) => {
    if (!error) return [];
    const name = `${prefix}${key}`;
    if (typeof error.message === 'string' && error.message !== '') {
      return [{ name: key === 'root' ? null : name, message: error.message }];
    }
    return listFaults(error as FieldErrors, `${name}.`);
  });
}

const NO_NUMBER = 'Enter a number';

function sayOfWhat(problem: FormProblem, figures: Partial<Record<string, string>>): FormProblem {
  const figure = problem.name === null ? undefined : figures[problem.name];
  if (problem.message !== NO_NUMBER || figure === undefined) return problem;
  return { ...problem, message: `Enter ${figure} as a number` };
}
