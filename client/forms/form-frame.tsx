import type { ReactNode, SubmitEventHandler } from 'react';
import { ErrorSummary, type FormProblem } from '../components/error-summary.tsx';
import { Key, Word } from '../components/key.tsx';
import { WordLink } from '../components/key-link.tsx';
import { PageHeading } from '../components/page-heading.tsx';

type SentForm = {
  handleSubmit: SubmitEventHandler<HTMLFormElement>;
  problems: FormProblem[];
  attempt: number;
  isSaving: boolean;
};

type FormFrameProps = {
  form: SentForm;
  /** The words on the key that sends it. */
  doer: string;
  /** Where to go without saving: an address, or what to do. */
  leave: string | (() => void);
  children: ReactNode;
};

/** The cells of a form, the key that sends it and the word that leaves it. */
export function FormFrame({ form, doer, leave, children }: FormFrameProps) {
  return (
    <form onSubmit={form.handleSubmit} noValidate className="max-w-form">
      {children}
      <div className="flex flex-wrap items-center gap-x-[18px] gap-y-2 pt-[22px]">
        <Key type="submit" face="main" disabled={form.isSaving} className="w-full desk:w-auto">
          {form.isSaving ? 'Saving…' : doer}
        </Key>
        {typeof leave === 'string' ? (
          <WordLink to={leave}>Leave without saving</WordLink>
        ) : (
          <Word onClick={leave}>Leave without saving</Word>
        )}
      </div>
    </form>
  );
}

type FormHeadProps = { form: SentForm; title: string; lead?: ReactNode; above?: ReactNode };

/** What is to be put right, then the heading of a page that is a form, and a sentence on it. */
export function FormHead({ form, title, lead, above }: FormHeadProps) {
  return (
    <>
      <ErrorSummary problems={form.problems} attempt={form.attempt} />
      {above}
      <PageHeading hasErrors={form.problems.length > 0}>{title}</PageHeading>
      <div className="max-w-read pt-1.5 pb-5 text-say wrap-anywhere">{lead}</div>
    </>
  );
}
