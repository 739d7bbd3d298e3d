import { useEffect, useRef } from 'react';
import { fieldId } from './field.tsx';
import { StopSign } from './signs.tsx';

/** A fault in words; `name` is the field it belongs to, null where it belongs to none. */
export type FormProblem = { name: string | null; message: string };

const COUNTS = ['No', 'One', 'Two', 'Three', 'Four', 'Five', 'Six', 'Seven', 'Eight', 'Nine'];

export function countProblems(count: number) {
  return `${COUNTS[count] ?? count} thing${count === 1 ? '' : 's'} to put right`;
}

function goToField(event: React.MouseEvent, name: string) {
  const field = document.getElementById(fieldId(name));
  if (!field) return;
  event.preventDefault();
  const control = field.matches('fieldset') ? field.querySelector('input') : field;
  field.scrollIntoView({ block: 'center' });
  control?.focus({ preventScroll: true });
}

const IN_TITLE = 'Error: ';

/** Puts "Error: " before the window's title; what it gives back takes it off again. */
function sayInTitle() {
  if (!document.title.startsWith(IN_TITLE)) document.title = `${IN_TITLE}${document.title}`;
  return () => {
    if (document.title.startsWith(IN_TITLE)) document.title = document.title.slice(IN_TITLE.length);
  };
}

/**
 * What stops a form, above its heading, with the same words as at the fields. It takes the focus each time
 * `attempt` changes while there is something in it.
 */
export function ErrorSummary({ problems, attempt }: { problems: FormProblem[]; attempt: number }) {
  const summary = useRef<HTMLDivElement>(null);
  const isShown = problems.length > 0;
  useEffect(() => {
    if (isShown) summary.current?.focus();
  }, [isShown, attempt]);
  useEffect(() => (isShown ? sayInTitle() : undefined), [isShown]);

  if (!isShown) return null;
  return (
    <div
      ref={summary}
      role="alert"
      tabIndex={-1}
      className="mb-[30px] grid max-w-form grid-cols-[44px_minmax(0,1fr)] gap-3 border-t-bar border-b border-stop py-3.5"
    >
      <StopSign className="size-10" />
      <div>
        <h2 className="font-gothic text-figure leading-[1.3] text-stop">
          {countProblems(problems.length)}
        </h2>
        <ul className="pt-1">
          {problems.map((problem) => (
            <li
              key={`${problem.name}:${problem.message}`}
              className="border-t border-hair desk:border-t-0"
            >
              {problem.name === null ? (
                <p className="words py-2 text-[1.125rem] leading-[1.3] font-medium">
                  {problem.message}
                </p>
              ) : (
                <ProblemLink name={problem.name} message={problem.message} />
              )}
            </li>
          ))}
        </ul>
      </div>
    </div>
  );
}

function ProblemLink({ name, message }: { name: string; message: string }) {
  return (
    <a
      href={`#${fieldId(name)}`}
      onClick={(event) => goToField(event, name)}
      className="words inline-flex min-h-key items-center py-1 text-[1.125rem] leading-[1.3] font-medium font-stretch-[96%] desk:min-h-[40px]"
    >
      <span>{message}</span>
    </a>
  );
}
