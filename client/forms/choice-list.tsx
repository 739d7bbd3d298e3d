export type Choice = { id: string; name: string; details: string; onPick: () => void };

/** Rows of which one is taken; each whole row is the key. */
export function ChoiceList({ choices }: { choices: Choice[] }) {
  if (choices.length === 0) return null;
  return (
    <ul className="border-t border-print">
      {choices.map(({ id, name, details, onPick }) => (
        <li key={id} className="border-b border-hair">
          <button
            type="button"
            onClick={onPick}
            className="group flex min-h-14 w-full cursor-pointer flex-wrap items-baseline gap-x-4 py-3 text-left"
          >
            <span className="words text-[1.125rem] leading-[1.2] font-semibold underline decoration-1 underline-offset-[0.25em]">
              {name}
            </span>
            <span className="words text-[1rem] leading-[1.3] text-print">{details}</span>
          </button>
        </li>
      ))}
    </ul>
  );
}
