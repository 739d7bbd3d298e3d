import type { Point } from '#shared/analysis/analysis.ts';
import type { JudgedBy, RunPage } from '#shared/schemas/runs.ts';
import { fromCelsius, type DisplayUnit } from '#shared/units.ts';
import { formatStep } from '#shared/wording/format.ts';
import { SectionHead } from '../../components/section-head.tsx';
import { pointsOf, uncertaintyReach } from './about-run.ts';
import { cycleRowsOf, type CycleRow } from './cycle-rows.ts';
import { CycleTable } from './cycle-table.tsx';
import { CycleLines } from './cycle-lines.tsx';

export type CyclesView = {
  rows: CycleRow[];
  judgedBy: JudgedBy | null;
  unit: DisplayUnit;
};

/** The points cycle by cycle: value, band, uncertainty and call. */
export function Cycles({ run, unit }: { run: RunPage; unit: DisplayUnit }) {
  const { analysis, judgedBy } = run.analysis;
  const view: CyclesView = { rows: cycleRowsOf(analysis), judgedBy, unit };
  const reach = uncertaintyReach(pointsOf(run));
  const state =
    reach && `figures within ±\u00a0${formatStep(reach.mostK, unit)}, probe and reading together`;
  return (
    <section aria-labelledby="cycles">
      <SectionHead id="cycles" state={state}>
        Cycles
      </SectionHead>
      {view.rows.length === 0 ? (
        <p className="py-3 text-body">No cut-out in this record, so there is no cycle to judge.</p>
      ) : (
        <>
          <div className="hidden desk:block">
            <CycleTable {...view} />
          </div>
          <div className="desk:hidden">
            <CycleLines {...view} />
          </div>
          <FirstPointNote rows={view.rows} />
        </>
      )}
    </section>
  );
}

function FirstPointNote({ rows }: { rows: CycleRow[] }) {
  const first = rows[0]?.cutOut;
  if (!first || first.judged || rows.length < 2) return null;
  return (
    <p className="pt-3 text-small text-print">
      The first cut-out after a cold start is shown but not judged: cold metal lets the air run
      ahead.
    </p>
  );
}

/** One decimal, without its unit: the head of the column has it. */
export function figure(point: Point, unit: DisplayUnit): string {
  return fromCelsius(point.tempC, unit).toFixed(1);
}
