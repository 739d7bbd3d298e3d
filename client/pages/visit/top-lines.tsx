/** Who and where, in two lines that never wrap. */
export function TopLines({ head, line = '' }: { head: string; line?: string }) {
  return (
    <p className="truncate font-gothic text-[15px] leading-[1.2] font-medium font-stretch-[94%] text-print">
      <b className="block truncate text-[17px] font-semibold text-ink">{head}</b>
      {line}
    </p>
  );
}
