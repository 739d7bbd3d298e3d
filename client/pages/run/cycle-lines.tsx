import type { Point } from '#shared/analysis/analysis.ts';
import { Table, Td, Th } from '../../components/table.tsx';
import { CallWords, runawayWords } from './cycle-table.tsx';
import { figure, type CyclesView } from './cycles.tsx';

/** A phone's table: two points to a row, each over its call. */
export function CycleLines({ rows, unit }: CyclesView) {
  const head = (
    <>
      <Th>No.</Th>
      <Th>Cut-out, °{unit}</Th>
      <Th>Reset, °{unit}</Th>
      <Th figure className="whitespace-nowrap">
        On/off, s
      </Th>
    </>
  );
  return (
    <Table caption="Cycles: each cut-out and reset with its call" head={head}>
      {rows.map((row) => (
        <tr key={row.number} className={row.runaway ? 'text-stop' : ''}>
          <Td className="fig">{row.number}</Td>
          {row.runaway ? (
            <Td colSpan={2}>{runawayWords(row, unit)}</Td>
          ) : (
            <>
              <PointCell point={row.cutOut} unit={unit} />
              <PointCell point={row.reset} unit={unit} />
            </>
          )}
          <Td figure className="whitespace-nowrap">
            {row.onS === null ? '–' : Math.round(row.onS)} /{' '}
            {row.offS === null ? '–' : Math.round(row.offS)}
          </Td>
        </tr>
      ))}
    </Table>
  );
}

function PointCell({ point, unit }: { point: Point | null; unit: CyclesView['unit'] }) {
  if (!point) return <Td>–</Td>;
  return (
    <Td>
      <b className="fig block text-[1.1875rem] font-semibold">{figure(point, unit)}</b>
      <span className="text-[1rem]">
        <CallWords point={point} />
      </span>
    </Td>
  );
}
