import { useId, useState } from 'react';
import type { RunPage } from '#shared/schemas/runs.ts';
import type { DisplayUnit } from '#shared/units.ts';
import { formatRated, formatStep } from '#shared/wording/format.ts';
import { useJudgeAgain } from '../../api/runs.ts';
import { Cells, SelectField } from '../../components/field.tsx';
import { Key } from '../../components/key.tsx';
import { Notice } from '../../components/notice.tsx';
import { SectionHead } from '../../components/section-head.tsx';
import { Failed } from '../../components/waiting.tsx';
import { dateWords, timeWords } from '../../format/when.ts';
import { judgedWords } from './about-run.ts';
import { JudgedWithProbe } from './judged-with-probe.tsx';

type JudgedAgainstProps = { run: RunPage; unit: DisplayUnit; zone: string };

/** What the run was judged by, and a way to judge it by something else. */
export function JudgedAgainst({ run, unit, zone }: JudgedAgainstProps) {
  const { judgedBy, judgedWith, madeAtMs, analysis } = run.analysis;
  return (
    <section aria-labelledby="judged">
      <SectionHead id="judged">Judged against</SectionHead>
      {judgedBy ? (
        <dl>
          <Row name="Heat setting">{run.conditions.setting}</Row>
          <Row name={judgedBy.name}>{judgedWords(judgedBy, unit)}</Row>
          <Row name="Allowance for the air">
            {formatStep(judgedBy.overshootK, unit)} above, {formatStep(judgedBy.undershootK, unit)}{' '}
            below
          </Row>
          <Row name="High limit">{formatRated(judgedBy.highLimitC, unit)}</Row>
          <Row name="Heat cut by">{formatRated(judgedBy.ceilingC, unit)}</Row>
        </dl>
      ) : (
        <p className="py-3 text-body">No rating is known, so no point is called.</p>
      )}
      {judgedWith && (
        <JudgedWithProbe used={judgedWith} judgedAtMs={madeAtMs} unit={unit} zone={zone} />
      )}
      <p className="py-2 text-small text-print">
        Judged {whenWords(madeAtMs, zone)} by engine version {analysis.version}.
      </p>
      <OtherEngine run={run} />
      {run.mayWrite && <JudgeAgain run={run} />}
      <Earlier run={run} unit={unit} zone={zone} />
    </section>
  );
}

/** The shop's server has another engine by now: the answer stays as it is until somebody asks for another. */
function OtherEngine({ run }: { run: RunPage }) {
  const { engineVersion, analysis, mayWrite } = run;
  if (engineVersion === '' || engineVersion === analysis.analysis.version) return null;
  return (
    <Notice kind="watch" head={`The shop’s server has engine version ${engineVersion} now.`}>
      This answer stays as it was given.
      {mayWrite && ' Judge again, and that of the other version stands beside it.'}
    </Notice>
  );
}

function Row({ name, children }: { name: string; children: React.ReactNode }) {
  return (
    <div className="flex flex-wrap items-baseline justify-between gap-x-4 border-b border-hair py-2">
      <dt className="lab">{name}</dt>
      <dd className="fig text-[1.0625rem] font-semibold">{children}</dd>
    </div>
  );
}

const SPECIFIED = 'specified';

function JudgeAgain({ run }: { run: RunPage }) {
  const judge = useJudgeAgain(run.id);
  const now = run.analysis.judgedBy?.ratingId ?? SPECIFIED;
  const [chosen, setChosen] = useState(now);
  const formId = useId();
  return (
    <form
      id={formId}
      className="pt-2"
      onSubmit={(event) => {
        event.preventDefault();
        judge.mutate(chosen === SPECIFIED ? null : chosen);
      }}
    >
      <Cells>
        <SelectField
          label="Judge it by"
          name="ratingId"
          value={chosen}
          onChange={(event) => setChosen(event.target.value)}
        >
          <option value={SPECIFIED}>What the machine is specified to have</option>
          {run.otherRatings.map(({ id, name }) => (
            <option key={id} value={id}>
              {name}
            </option>
          ))}
        </SelectField>
      </Cells>
      <div className="flex flex-wrap items-center gap-4 pt-3">
        <Key type="submit" disabled={judge.isPending}>
          {judge.isPending ? 'Judging…' : 'Judge again'}
        </Key>
        <span role="status" className="text-small">
          {judge.isSuccess && 'Judged again. The earlier judgement is kept below.'}
        </span>
      </div>
      {judge.isError && <Failed error={judge.error} />}
    </form>
  );
}

function Earlier({ run, unit, zone }: JudgedAgainstProps) {
  if (run.earlier.length === 0) return null;
  return (
    <>
      <h3 className="lab pt-5 pb-1">Earlier judgements</h3>
      <ul>
        {run.earlier.map(({ id, madeAtMs, judgedBy, version }) => (
          <li key={id} className="words border-t border-hair py-2 text-[1rem] leading-[1.3]">
            {whenWords(madeAtMs, zone)}
            {version && `, engine version ${version}`},{' '}
            {judgedBy ? `${judgedBy.name}: ${judgedWords(judgedBy, unit)}` : 'no rating'}
          </li>
        ))}
      </ul>
    </>
  );
}

function whenWords(atMs: number, zone: string): string {
  return `${dateWords(atMs, zone, atMs)} at ${timeWords(atMs, zone)}`;
}
