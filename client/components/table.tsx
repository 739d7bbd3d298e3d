import type { ReactNode, TdHTMLAttributes, ThHTMLAttributes } from 'react';

type TableProps = {
  caption: string;
  head: ReactNode;
  children: ReactNode;
  className?: string;
  headClassName?: string;
};

/** Printed labels over a 1.5 px line, rows parted by hairlines; figures right, words left. */
export function Table({ caption, head, children, className = '', headClassName = '' }: TableProps) {
  return (
    <table
      className={`w-full border-collapse font-gothic text-table font-stretch-[92%] tabular-nums lining-nums ${className}`}
    >
      <caption className="sr-only">{caption}</caption>
      <thead className={headClassName}>
        <tr>{head}</tr>
      </thead>
      <tbody>{children}</tbody>
    </table>
  );
}

type Side = { figure?: boolean };

export function Th({
  figure = false,
  className = '',
  ...th
}: ThHTMLAttributes<HTMLTableCellElement> & Side) {
  return (
    <th
      scope="col"
      className={`border-b-line border-print py-2 pr-3 align-bottom font-gothic text-label font-stretch-[104%] text-print last:pr-0 ${figure ? 'text-right' : 'text-left'} ${className}`}
      {...th}
    />
  );
}

export function Td({
  figure = false,
  className = '',
  ...td
}: TdHTMLAttributes<HTMLTableCellElement> & Side) {
  return (
    <td
      className={`border-b border-hair py-[9px] pr-3 align-middle last:pr-0 ${figure ? 'fig text-right' : ''} ${className}`}
      {...td}
    />
  );
}
