import { Suspense, useState, type ReactNode } from 'react';
import type { RunEventOf } from '#shared/recorder/run-event.ts';
import { specifiedFor } from '#shared/judging/specified-for.ts';
import { RUN_CAUTIONS, SAFETY_LINE } from '#shared/wording/safety-lines.ts';
import { CautionTicks } from '../../components/caution-ticks.tsx';
import { SelectField } from '../../components/field.tsx';
import { Notice } from '../../components/notice.tsx';
import { SectionHead } from '../../components/section-head.tsx';
import { ThemeWord } from '../../components/theme-word.tsx';
import { Choice } from './choice.tsx';
import { canReachProbe, ProbePart } from './lazy-live.tsx';
import { HEATS, ProbeOptions } from './probe-options.tsx';
import { keyClass } from '../../components/key-face.ts';
import type { Preferences } from './preferences.ts';
import { usePress } from './press.ts';
import { SettingsForm } from './settings-form.tsx';
import type { Sources } from './sources.ts';

export type NewRun = Omit<RunEventOf<'start'>, 'id' | 'runId' | 'n' | 'atS' | 'wallMs' | 'kind'>;

type StartPageProps = {
  sources: Sources;
  isTicked: boolean;
  /** How many runs of this visit are known. */
  runs: number;
  problem: string | null;
  preferences: Preferences;
  onPrefer: (preferences: Preferences) => void;
  onTick: () => void;
  onStart: (run: NewRun, downMonoMs: number) => void;
  children?: ReactNode;
};

const UNITS = [
  { value: 'F', words: '°F' },
  { value: 'C', words: '°C' },
] as const;
const FIGURES = [
  { value: 'whole', words: 'Whole degrees' },
  { value: 'tenths', words: 'With tenths' },
] as const;

/** Before the clock runs: cautions, which probe, which heat. The rest is asked for at the end. */
export function StartPage(props: StartPageProps) {
  const { sources, isTicked, runs, problem, preferences, onPrefer, onStart } = props;
  const { machine, session, probes, visit } = sources;
  const [setting, setSetting] = useState(machine.specified[0]?.setting ?? ('high' as const));
  const [probeId, setProbeId] = useState<string | null>(null);
  const unit = preferences.unit ?? session.shop.unit;
  const press = usePress((downMonoMs) =>
    onStart(
      {
        visitId: visit.id,
        label: `Run ${runs + 1}`,
        unit,
        hasTenths: preferences.hasTenths,
        setup: {
          ...{ placement: 'At the exhaust outlet', duct: null, load: null, setting },
          ...{ roomTemp: null, probeId },
        },
      },
      downMonoMs,
    ),
  );
  return (
    <main id="main" className="mx-auto flex min-h-dvh max-w-site flex-col bg-paper">
      <header className="sw-top">
        <a className="sw-back" href={`/visits/${visit.id}`}>
          Visit
        </a>
        <div className="sw-what !cursor-default pt-1.5">
          <b>
            {machine.make} {machine.model}
          </b>
          {visit.job.customer.name}
        </div>
        <ThemeWord />
      </header>
      <div className="flex-1 px-4 pb-6">
        <h1 className="pt-5 pb-3 font-serif text-page">Stopwatch</h1>
        {!visit.mayRecord && (
          <Notice kind="watch" head="Runs are recorded by the technician of this visit." />
        )}
        {props.children}
        {!isTicked && <Cautions onTick={props.onTick} />}
        <div className="grid grid-cols-1 gap-px border border-print bg-rule">
          <Choice
            label="Heat setting"
            name="setting"
            value={setting}
            options={HEATS}
            onChoose={setSetting}
          />
          <SelectField
            label="Probe"
            name="probe"
            hint="Its accuracy goes into every call."
            value={probeId ?? ''}
            onChange={(event) => setProbeId(event.target.value || null)}
          >
            <ProbeOptions probes={probes} />
          </SelectField>
          <Choice
            label="Read in"
            name="unit"
            value={unit}
            options={UNITS}
            onChoose={(value) => onPrefer({ ...preferences, unit: value })}
          />
          <Choice
            label="Figures"
            name="figures"
            value={preferences.hasTenths ? 'tenths' : 'whole'}
            options={FIGURES}
            onChoose={(value) => onPrefer({ ...preferences, hasTenths: value === 'tenths' })}
          />
        </div>
        {specifiedFor(machine, setting) === null && (
          <Notice kind="watch" head="No rating is set for this heat." className="mt-3">
            The guard goes by the usual high limit of 196 °F, and no point is judged.
          </Notice>
        )}
        {canReachProbe && (
          <Suspense>
            <ProbePart isNamed={probeId !== null} />
          </Suspense>
        )}
        <div className="pt-4">
          <SettingsForm preferences={preferences} onPrefer={onPrefer} />
        </div>
        <p className="pt-3 text-small text-print">{SAFETY_LINE}</p>
      </div>
      <div className="sw-foot">
        {problem && (
          <p role="alert" className="sw-problem">
            {problem}
          </p>
        )}
        {!isTicked && (
          <p className="pb-2 text-small text-print">
            Tick the cautions first; then the clock starts.
          </p>
        )}
        <button
          type="button"
          disabled={!isTicked || !visit.mayRecord}
          className={keyClass({ face: 'main', size: 'site', className: 'w-full !min-h-[72px]' })}
          {...press}
        >
          Start the clock
        </button>
      </div>
    </main>
  );
}

function Cautions({ onTick }: { onTick: () => void }) {
  const [ticked, setTicked] = useState(0);
  return (
    <section aria-labelledby="cautions" className="pb-5">
      <SectionHead site id="cautions" state={`${ticked} of ${RUN_CAUTIONS.length}`}>
        Safety first
      </SectionHead>
      <CautionTicks onCount={setTicked} onAll={onTick} />
    </section>
  );
}
