import type { ReadPreview } from '#shared/schemas/uploads.ts';
import { Table, Td, Th } from '../../../components/table.tsx';
import { formatRunTime } from '../run-time.ts';

type FirstRowsProps = {
  rows: ReadPreview['preview'];
  caption: string;
  /** null: told elsewhere. */
  unit: string | null;
};

/** Rows of the file beside what was made of them: the time of the run, the temperature. */
export function FirstRows({ rows, caption, unit }: FirstRowsProps) {
  const decimals = decimalsOf(rows);
  return (
    <Table
      caption={caption}
      head={
        <>
          <Th figure className="w-14">
            Row
          </Th>
          <Th>In the file</Th>
          <Th figure>Time</Th>
          <Th figure>{unit ?? 'Reading'}</Th>
        </>
      }
    >
      {rows.map(({ row, cells, timeS, temp }) => (
        <tr key={row}>
          <Td figure className="text-print">
            {row}
          </Td>
          <Td className="text-[0.9375rem] text-print">
            <Cells cells={cells} />
          </Td>
          <Td figure className="font-semibold">
            {timeS === null ? '–' : formatRunTime(timeS)}
          </Td>
          <Td figure className="font-semibold">
            {temp === null ? '–' : temp.toFixed(decimals).replace('-', '−')}
          </Td>
        </tr>
      ))}
    </Table>
  );
}

/** As many decimals as the finest reading shown has, at most three. */
function decimalsOf(rows: FirstRowsProps['rows']): number {
  const decimals = rows.map(({ temp }) => {
    const text = temp === null ? '' : String(Number(temp.toPrecision(12)));
    return text.includes('.') ? text.length - text.indexOf('.') - 1 : 0;
  });
  return Math.min(3, Math.max(0, ...decimals));
}

function Cells({ cells }: { cells: string[] }) {
  return (
    <span className="flex flex-wrap gap-x-3 wrap-anywhere">
      {cells.map((cell, index) => (
        <span key={index}>{cell === '' ? '(empty)' : cell}</span>
      ))}
    </span>
  );
}
