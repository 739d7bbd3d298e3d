import type { ReadPreview } from '#shared/schemas/uploads.ts';
import { Table, Td, Th } from '../../../components/table.tsx';
import { unitWords } from '../../../format/rating-words.ts';
import { ROLE_WORDS } from './corrections.ts';

/** Every column of the file: what it is taken for, in which unit, and what says so. */
export function ColumnsTable({ columns, channel }: Pick<ReadPreview, 'columns' | 'channel'>) {
  return (
    <Table
      caption="The columns as understood"
      head={
        <>
          <Th>Column</Th>
          <Th>Taken for</Th>
          <Th>Unit</Th>
        </>
      }
    >
      {columns.map(({ index, name, role, unit, unitFrom }) => (
        <tr key={index}>
          <Td className="font-semibold wrap-anywhere">{name}</Td>
          <Td>{name === channel ? 'the exhaust' : ROLE_WORDS[role]}</Td>
          <Td>
            {unit ? unitWords(unit) : '–'}
            {unitFrom && (
              <span className="text-small text-print">
                {unitFrom === 'answered' ? ', as answered' : ` from ${unitFrom}`}
              </span>
            )}
          </Td>
        </tr>
      ))}
    </Table>
  );
}
