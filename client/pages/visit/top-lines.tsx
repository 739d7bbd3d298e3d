/** Who and where, in two lines that never wrap. */
export function TopLines({ head, line = '' }: { head: string; line?: string }) {
  return (
    <p className="truncate font-gothic text-[0.9375rem] leading-[1.2] font-medium font-stretch-[94%] text-print">
      <b className="block truncate text-[1.0625rem] font-semibold text-ink">{head}</b>
      {line}
    </p>
  );
}
