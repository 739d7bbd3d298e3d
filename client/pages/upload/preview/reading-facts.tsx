import type { QuestionSubject } from '#shared/reading/log-reading.ts';
import type { ReadPreview, ReadingChoices, Upload } from '#shared/schemas/uploads.ts';
import { useChooseReading } from '../../../api/uploads.ts';
import { Cells, SelectField } from '../../../components/field.tsx';
import { Word } from '../../../components/key.tsx';
import { Notice } from '../../../components/notice.tsx';
import { corrections, ROLE_WORDS } from './corrections.ts';

type ReadingFactsProps = { upload: Upload; preview: ReadPreview };

/** How each thing was understood, and a way to say otherwise: the file is then read anew. */
export function ReadingFacts({ upload, preview }: ReadingFactsProps) {
  const choose = useChooseReading(upload.id);
  const { choices } = upload;
  const isCorrected = choices.channel !== null || Object.keys(choices.answers).length > 0;

  function handleAnswer(about: QuestionSubject, answer: string) {
    const others = Object.entries(choices.answers).filter(([subject]) => subject !== about);
    const given = answer === '' ? others : [...others, [about, answer]];
    choose.mutate({ ...choices, answers: Object.fromEntries(given) });
  }

  return (
    <>
      <Cells className="grid-cols-1 min-[380px]:grid-cols-2 desk:grid-cols-3">
        <ChannelField
          preview={preview}
          choices={choices}
          isBusy={choose.isPending}
          onChannel={(channel) => choose.mutate({ ...choices, channel })}
        />
        {corrections(preview).map(({ about, label, found, options }) => (
          <SelectField
            key={about}
            label={label}
            name={`choice-${about}`}
            value={choices.answers[about] ?? ''}
            disabled={choose.isPending || options.length === 0}
            onChange={(event) => handleAnswer(about, event.target.value)}
          >
            <option value="">{choices.answers[about] ? 'as found' : found}</option>
            {options.map(({ answer, words }) => (
              <option key={answer} value={answer}>
                {words}
              </option>
            ))}
          </SelectField>
        ))}
      </Cells>
      {choose.isError && (
        <Notice kind="stop" role="alert" head={choose.error.message} className="mt-3" />
      )}
      {isCorrected && (
        <Word
          disabled={choose.isPending}
          onClick={() => choose.mutate({ answers: {}, channel: null })}
        >
          Read it as found again
        </Word>
      )}
    </>
  );
}

type ChannelFieldProps = {
  preview: ReadPreview;
  choices: ReadingChoices;
  isBusy: boolean;
  onChannel: (channel: string) => void;
};

function ChannelField({ preview, isBusy, onChannel }: ChannelFieldProps) {
  const possible = preview.columns.filter(({ role }) => role !== 'time' && role !== 'date');
  return (
    <SelectField
      label="The exhaust is in column"
      name="choice-channel"
      className="min-[380px]:col-span-2"
      value={preview.channel}
      disabled={isBusy}
      onChange={(event) => onChannel(event.target.value)}
    >
      {possible.map(({ index, name, role }) => (
        <option key={index} value={name}>
          {name}
          {role === 'temperature' ? '' : ` (${ROLE_WORDS[role]})`}
        </option>
      ))}
    </SelectField>
  );
}
