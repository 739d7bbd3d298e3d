import type {
  InputHTMLAttributes,
  ReactNode,
  Ref,
  SelectHTMLAttributes,
  TextareaHTMLAttributes,
} from 'react';
import { OutsideGlyph } from './glyphs.tsx';

/** The id that an error summary links to. */
export function fieldId(name: string) {
  return `field-${name.replaceAll('.', '-')}`;
}

type CellProps = {
  label: ReactNode;
  name: string;
  hint?: ReactNode;
  error?: string | undefined;
  className?: string;
};

/** Cells of a service form: they share their rules, drawn by the ground that shows between them. */
export function Cells({ className = '', children }: { className?: string; children: ReactNode }) {
  // Each cell rules its own edge, so that a row with fewer cells ends in blank paper.
  return (
    <div
      className={`grid gap-px overflow-hidden border border-print bg-strip *:ring-1 *:ring-rule ${className}`}
    >
      {children}
    </div>
  );
}

const INPUT =
  'block w-full border-0 bg-transparent px-3 pb-2 font-gothic text-[1.25rem] leading-[1.3] font-medium font-stretch-[94%] tabular-nums text-ink outline-none min-h-cell';

/** The control reaches up behind the label's last line, so that the whole cell is the control. */
const UNDER_LABEL = '-mt-[25px] pt-[29px]';

/** One cell: the label inside its top left, the control filling it, hint and fault under the value. */
function Cell({
  label,
  name,
  hint,
  error,
  className = '',
  children,
}: CellProps & { children: ReactNode }) {
  const id = fieldId(name);
  return (
    <div
      className={`relative min-w-0 bg-strip focus-within:z-10 focus-within:outline-3 focus-within:-outline-offset-2 focus-within:outline-focus ${error ? 'pl-2 before:absolute before:inset-y-0 before:left-0 before:w-1.5 before:bg-stop' : ''} ${className}`}
    >
      <label htmlFor={id} className="lab relative z-[1] block px-3 pt-[7px]">
        {label}
      </label>
      {children}
      {hint && (
        <p id={`${id}-hint`} className="-mt-1 px-3 pb-2 text-small text-print">
          {hint}
        </p>
      )}
      {error && (
        <p
          id={`${id}-fault`}
          className="-mt-0.5 flex gap-2 px-3 pb-2.5 font-gothic text-[1rem] leading-[1.3] font-semibold font-stretch-[96%] text-stop"
        >
          <OutsideGlyph className="mt-0.5 size-[17px]" />
          <span>{error}</span>
        </p>
      )}
    </div>
  );
}

function described({ name, hint, error }: Pick<CellProps, 'name' | 'hint' | 'error'>) {
  const id = fieldId(name);
  const ids = [hint && `${id}-hint`, error && `${id}-fault`].filter(Boolean).join(' ');
  return {
    id,
    name,
    ...(ids && { 'aria-describedby': ids }),
    ...(error && { 'aria-invalid': true as const }),
  };
}

type WithRef<Attributes, Element> = Omit<Attributes, 'className'> & { ref?: Ref<Element> };

export function TextField({
  label,
  name,
  hint,
  error,
  className = '',
  ...input
}: CellProps & WithRef<InputHTMLAttributes<HTMLInputElement>, HTMLInputElement>) {
  return (
    <Cell {...{ label, name, hint, error, className }}>
      <input
        {...input}
        {...described({ name, hint, error })}
        className={`${INPUT} ${UNDER_LABEL}`}
      />
    </Cell>
  );
}

export function TextAreaField({
  label,
  name,
  hint,
  error,
  className = '',
  rows = 3,
  ...area
}: CellProps & WithRef<TextareaHTMLAttributes<HTMLTextAreaElement>, HTMLTextAreaElement>) {
  return (
    <Cell {...{ label, name, hint, error, className }}>
      <textarea
        rows={rows}
        {...area}
        {...described({ name, hint, error })}
        className={`${INPUT} resize-none pt-0.5`}
      />
    </Cell>
  );
}

export function SelectField({
  label,
  name,
  hint,
  error,
  className = '',
  children,
  ...select
}: CellProps & WithRef<SelectHTMLAttributes<HTMLSelectElement>, HTMLSelectElement>) {
  return (
    <Cell {...{ label, name, hint, error, className }}>
      <div className="relative">
        <select
          {...select}
          {...described({ name, hint, error })}
          className={`${INPUT} cursor-pointer appearance-none truncate pr-9 ${UNDER_LABEL}`}
        >
          {children}
        </select>
        <svg
          className="pointer-events-none absolute right-3 bottom-[18px] w-[11px] text-print"
          viewBox="0 0 11 7"
          fill="none"
          aria-hidden="true"
        >
          <path d="M1 1l4.500 4.500L10 1" stroke="currentColor" strokeWidth="1.600" />
        </svg>
      </div>
    </Cell>
  );
}

/** A cell whose value is a tick: `label` above, the words of the tick beside it. */
export function TickField({
  label,
  name,
  tick,
  className = '',
  ...input
}: Omit<CellProps, 'hint' | 'error'> & { tick: string } & WithRef<
    InputHTMLAttributes<HTMLInputElement>,
    HTMLInputElement
  >) {
  const id = fieldId(name);
  return (
    <label
      htmlFor={id}
      className={`relative block min-h-cell cursor-pointer bg-strip px-3 pt-[7px] pb-2 focus-within:outline-3 focus-within:-outline-offset-2 focus-within:outline-focus ${className}`}
    >
      <span className="lab block">{label}</span>
      <span className="words flex items-center gap-[10px] pt-[5px] text-[1.125rem] leading-none font-medium">
        <input type="checkbox" {...input} id={id} name={name} className="outline-none" />
        {tick}
      </span>
    </label>
  );
}

/** One of two or three, as keys side by side. */
export function PickField({
  label,
  name,
  options,
  error,
  className = '',
  ...input
}: Omit<CellProps, 'hint'> & {
  options: { value: string; words: string }[];
} & WithRef<InputHTMLAttributes<HTMLInputElement>, HTMLInputElement>) {
  return (
    <fieldset
      id={fieldId(name)}
      className={`relative bg-strip px-3 pt-[7px] pb-3 ${error ? 'pl-5 before:absolute before:inset-y-0 before:left-0 before:w-1.5 before:bg-stop' : ''} ${className}`}
    >
      <legend className="lab float-left mb-1.5 w-full">{label}</legend>
      <div className="clear-both grid auto-cols-fr grid-flow-col gap-2">
        {options.map(({ value, words }) => (
          <label key={value} className="relative">
            <input
              type="radio"
              {...input}
              name={name}
              value={value}
              className="peer absolute inset-0 size-full cursor-pointer opacity-0"
            />
            <span className="words grid min-h-[50px] place-items-center rounded-key border-line border-print px-2 text-center text-[1.0625rem] leading-none font-medium peer-checked:border-ink peer-checked:bg-ink peer-checked:font-semibold peer-checked:text-paper peer-focus-visible:outline-3 peer-focus-visible:outline-offset-2 peer-focus-visible:outline-focus">
              {words}
            </span>
          </label>
        ))}
      </div>
      {error && (
        <p className="flex gap-2 pt-2 font-gothic text-[1rem] leading-[1.3] font-semibold text-stop">
          <OutsideGlyph className="mt-0.5 size-[17px]" />
          <span>{error}</span>
        </p>
      )}
    </fieldset>
  );
}
