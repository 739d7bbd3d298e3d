import type { Point } from '#shared/analysis/analysis.ts';
import { formatBand, formatStep, formatTemp } from '#shared/wording/format.ts';
import { wordCall } from '#shared/wording/word-call.ts';
import { HatchSwatch } from '../../chart/chart-legend.tsx';
import { CloseUp, type RatedBand } from '../../chart/close-up.tsx';
import { AllowanceGlyph, CallGlyph } from '../../components/glyphs.tsx';
import { Table, Td, Th } from '../../components/table.tsx';
import type { CycleRow } from './cycle-rows.ts';
import { figure, type CyclesView } from './cycles.tsx';

/** A desk's table: every point with its close-up against the band. */
export function CycleTable({ rows, judgedBy, unit }: CyclesView) {
  const against = (midC: number, tolK: number) =>
    formatBand(midC, tolK, unit).replace(`\u00a0°${unit}`, '');
  const opens = judgedBy && { midC: judgedBy.opensC, tolK: judgedBy.opensTolK };
  const closes = judgedBy && { midC: judgedBy.closesC, tolK: judgedBy.closesTolK };
  const head = (
    <>
      <Th className="w-[60px]">No.</Th>
      <Th figure>Heat on, s</Th>
      <Th figure>Cut-out, °{unit}</Th>
      <Th>{opens ? `against ${against(opens.midC, opens.tolK)}` : ''}</Th>
      <Th>Call</Th>
      <Th figure>Heat off, s</Th>
      <Th figure>Reset, °{unit}</Th>
      <Th>{closes ? `against ${against(closes.midC, closes.tolK)}` : ''}</Th>
      <Th>Call</Th>
    </>
  );
  return (
    <Table caption="Cycles: each cut-out and reset with its band and call" head={head}>
      {rows.map((row) =>
        row.runaway ? (
          <RunawayRow key={row.number} row={row} unit={unit} />
        ) : (
          <tr key={row.number} className="*:align-middle">
            <Td className="fig text-[1.1875rem]">{row.number}</Td>
            <SpanCell spanS={row.onS} />
            <PointCells point={row.cutOut} band={opens} unit={unit} />
            <SpanCell spanS={row.offS} />
            <PointCells point={row.reset} band={closes} unit={unit} />
          </tr>
        ),
      )}
    </Table>
  );
}

function SpanCell({ spanS }: { spanS: number | null }) {
  return (
    <Td figure className="text-[1.1875rem]">
      {spanS === null ? '–' : Math.round(spanS)}
    </Td>
  );
}

type PointCellsProps = {
  point: Point | null;
  band: RatedBand | null;
  unit: CyclesView['unit'];
};

function PointCells({ point, band, unit }: PointCellsProps) {
  if (!point) {
    return (
      <>
        <Td figure>–</Td>
        <Td />
        <Td />
      </>
    );
  }
  return (
    <>
      <Td figure className="text-[1.1875rem]" title={`± ${formatStep(point.uTotalK, unit)}`}>
        {figure(point, unit)}
        <span className="sr-only"> plus or minus {formatStep(point.uTotalK, unit)}</span>
      </Td>
      <Td>{band && <CloseUp {...{ point, band, unit }} />}</Td>
      <Td>
        <CallWords point={point} />
      </Td>
    </>
  );
}

/** The shape and the word of a call. */
export function CallWords({ point }: { point: Point }) {
  if (!point.call) return <span className="text-print">not judged</span>;
  return (
    <span
      className={`flex items-center gap-2 ${point.call === 'outside' ? 'text-stop' : ''}`}
      title={wordCall(point.call).sentence}
    >
      {point.call === 'within-allowance' && point.kind === 'reset' ? (
        <AllowanceGlyph open="lower" />
      ) : (
        <CallGlyph call={point.call} />
      )}
      {wordCall(point.call).word}
    </span>
  );
}

function RunawayRow({ row, unit }: { row: CycleRow; unit: CyclesView['unit'] }) {
  return (
    <tr className="text-stop *:align-middle">
      <Td className="fig text-[1.1875rem]">{row.number}</Td>
      <SpanCell spanS={row.onS} />
      <Td colSpan={7} className="pl-5">
        <span className="flex items-center gap-3">
          <HatchSwatch />
          {runawayWords(row, unit)}
        </span>
      </Td>
    </tr>
  );
}

export function runawayWords({ runaway }: CycleRow, unit: CyclesView['unit']): string {
  const peakC = runaway?.evidence.peakC;
  return typeof peakC === 'number' ? `no cut-out; up to ${formatTemp(peakC, unit)}` : 'no cut-out';
}
