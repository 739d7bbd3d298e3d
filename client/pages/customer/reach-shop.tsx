/** A phone number to press. */
export function Phone({ number }: { number: string }) {
  return (
    <a
      href={`tel:${number.replace(/[^+\d]/g, '')}`}
      className="relative -my-[15px] inline-block py-[15px] whitespace-nowrap"
    >
      {number}
    </a>
  );
}
