import type { Finding } from '#shared/analysis/analysis.ts';
import type { RunPage } from '#shared/schemas/runs.ts';
import type { About, Cause, WordedFinding } from '#shared/wording/finding-words.ts';
import { wordFinding } from '#shared/wording/word-finding.ts';
import { SectionHead } from '../../components/section-head.tsx';
import { Table, Td, Th } from '../../components/table.tsx';

/** What was found, what it rests on, what it would be consistent with, and what to check next. */
export function Findings({ run, about }: { run: RunPage; about: About }) {
  return (
    <section aria-labelledby="findings">
      <SectionHead id="findings" state="evidence for a person to judge; no leave to bypass a limit">
        Findings
      </SectionHead>
      {run.analysis.analysis.findings.map((finding, i) => (
        <FindingSheet key={i} number={i + 1} finding={finding} about={about} />
      ))}
    </section>
  );
}

type FindingSheetProps = { number: number; finding: Finding; about: About };

function FindingSheet({ number, finding, about }: FindingSheetProps) {
  const worded = wordFinding(finding, about);
  return (
    <article className="border-b border-print pt-[18px] pb-[30px] last:border-b-0">
      <header className="flex items-baseline gap-4">
        <span className="fig w-7 text-[1.625rem] font-semibold text-print">{number}</span>
        <h3 className="font-serif text-[1.4375rem] leading-[1.15] font-semibold tracking-[-0.01em] desk:text-finding">
          {worded.title}
        </h3>
      </header>
      <div className="desk:pl-11">
        <Seen worded={worded} />
        {worded.causes.length > 0 && <Causes causes={worded.causes} />}
        {worded.nextChecks.length > 0 && <NextChecks checks={worded.nextChecks} />}
      </div>
    </article>
  );
}

function Seen({ worded: { sentences, evidence } }: { worded: WordedFinding }) {
  return (
    <div className="gap-10 pt-2 pb-3.5 desk:grid desk:grid-cols-[minmax(0,62ch)_minmax(280px,340px)] desk:justify-between">
      <p className="max-w-read text-say">{sentences.join(' ')}</p>
      <dl className="mt-3 border-t border-print desk:mt-0 desk:border-t-0">
        {evidence.map(({ label, value }) => (
          <div
            key={label}
            className="words flex items-baseline justify-between gap-4 border-b border-hair py-1.5"
          >
            <dt className="lab">{label}</dt>
            <dd className="fig text-right text-[1.0625rem] font-semibold">{value}</dd>
          </div>
        ))}
      </dl>
    </div>
  );
}

/** Likely causes as a table on a desk, as a list on a phone. */
export function Causes({ causes }: { causes: Cause[] }) {
  const head = (
    <>
      <Th className="w-[26%]">Likely cause, in order</Th>
      <Th>Why</Th>
      <Th className="w-[30%]">What settles it</Th>
    </>
  );
  return (
    <>
      <div className="hidden desk:block">
        <Table caption="Likely causes, in order" head={head}>
          {causes.map(({ cause, why, settles }) => (
            <tr key={cause}>
              <Td className="font-semibold">{cause}</Td>
              <Td className="font-serif text-[1rem] font-stretch-[100%]">{why}</Td>
              <Td className="font-serif text-[1rem] font-stretch-[100%]">{settles}</Td>
            </tr>
          ))}
        </Table>
      </div>
      <div className="pt-2 desk:hidden">
        <h4 className="lab border-b border-print py-2">Likely cause, in order</h4>
        <ol>
          {causes.map(({ cause, why, settles }) => (
            <li key={cause} className="border-b border-hair py-2.5">
              <p className="words text-[1.0625rem] leading-[1.3] font-semibold">{cause}</p>
              <p className="text-[1rem] leading-[1.4]">{why}</p>
              <p className="text-[1rem] leading-[1.4]">
                <span className="lab">Settles it: </span>
                {settles}
              </p>
            </li>
          ))}
        </ol>
      </div>
    </>
  );
}

/** Checks to tick off. */
export function NextChecks({ checks }: { checks: string[] }) {
  return (
    <div className="pt-4 desk:grid desk:grid-cols-[26%_minmax(0,1fr)]">
      <h4 className="lab py-2">Check next</h4>
      <ul>
        {checks.map((check) => (
          <li key={check}>
            <label className="words grid min-h-touch cursor-pointer grid-cols-[24px_minmax(0,1fr)] items-center gap-3 py-1 text-[1.0625rem] leading-[1.3] font-medium">
              <input type="checkbox" />
              {check}
            </label>
          </li>
        ))}
      </ul>
    </div>
  );
}
