import { useState, type SubmitEvent } from 'react';
import type { QuestionSubject } from '#shared/reading/log-reading.ts';
import { temperatureUnitSchema } from '#shared/schemas/primitives.ts';
import type { Upload } from '#shared/schemas/uploads.ts';
import { useChooseReading } from '../../api/uploads.ts';
import { ErrorSummary } from '../../components/error-summary.tsx';
import { Key, Word } from '../../components/key.tsx';
import { PageHeading } from '../../components/page-heading.tsx';
import { unitWords } from '../../format/rating-words.ts';
import { FirstRows } from './preview/first-rows.tsx';

type Asked = Extract<Upload['reading'], { state: 'question' }>['question'];

type QuestionProps = { upload: Upload; question: Asked; onLeave: () => void };

const HEADINGS: Record<QuestionSubject, string> = {
  unit: 'Which unit are the temperatures in?',
  'date-order': 'Which comes first, the day or the month?',
  decimal: 'What does the comma stand for?',
  channel: 'Which column is the exhaust?',
  clock: 'How are the times written?',
  interval: 'How far apart are the readings?',
  scale: 'What is one step of the readings?',
  runs: 'Which of the runs is it?',
  encoding: 'How is the text written?',
};

function unitOf(answer: string) {
  const unit = temperatureUnitSchema.safeParse(answer);
  return unit.success ? unitWords(unit.data) : null;
}

/** The file can be read in more than one way: each answer with the first rows as they would be, the proposal first. */
export function Question({ upload, question, onLeave }: QuestionProps) {
  const choose = useChooseReading(upload.id);
  const [answer, setAnswer] = useState(question.options[0]?.answer ?? '');

  function handleSubmit(event: SubmitEvent<HTMLFormElement>) {
    event.preventDefault();
    const { answers, channel } = upload.choices;
    choose.mutate({ answers: { ...answers, [question.about]: answer }, channel });
  }

  const problems = choose.isError ? [{ name: null, message: choose.error.message }] : [];
  return (
    <form onSubmit={handleSubmit} noValidate>
      <ErrorSummary problems={problems} attempt={choose.submittedAt} />
      <p className="lab">{upload.fileName} can be read in more than one way</p>
      <PageHeading className="pt-1">{HEADINGS[question.about]}</PageHeading>
      <p id="question-why" className="max-w-read pt-2 pb-5 text-say">
        {question.message}
      </p>
      <fieldset aria-describedby="question-why" className="border border-print bg-strip">
        <legend className="sr-only">{HEADINGS[question.about]}</legend>
        {question.options.map((option, index) => (
          <div key={option.answer} className="border-b border-rule p-3 last:border-b-0 desk:p-5">
            <label className="words flex min-h-touch cursor-pointer items-center gap-3.5 text-[1.125rem] font-semibold">
              <input
                type="radio"
                name="answer"
                value={option.answer}
                checked={answer === option.answer}
                onChange={() => setAnswer(option.answer)}
                className="size-6 shrink-0 accent-ink"
              />
              <span>
                {option.label}
                {index === 0 && <span className="font-medium text-print">, as proposed</span>}
              </span>
            </label>
            {option.preview.length > 0 && (
              <FirstRows
                rows={option.preview.slice(0, 4)}
                caption={`The first rows, read as ${option.label}`}
                unit={question.about === 'unit' ? unitOf(option.answer) : null}
              />
            )}
          </div>
        ))}
      </fieldset>
      <div className="flex flex-wrap items-center gap-4 pt-5">
        <Key type="submit" face="main" size="site" className="min-w-52" disabled={choose.isPending}>
          {choose.isPending ? 'Reading…' : 'Read it this way'}
        </Key>
        <Word onClick={onLeave}>Throw the file away</Word>
      </div>
    </form>
  );
}
