import type { MachinePage } from '#shared/schemas/homes.ts';
import { Notice } from '../components/notice.tsx';
import { describeDifferences } from '../format/describe-differences.ts';

type FittedDifferencesProps = {
  machine: Pick<MachinePage, 'specified' | 'fitted'>;
  className?: string;
};

/** Where what is in the machine differs from what it is specified to have; nothing where it does not. */
export function FittedDifferences({ machine, className = '' }: FittedDifferencesProps) {
  const differences = describeDifferences(machine);
  if (differences.length === 0) return null;
  return (
    <Notice
      kind="watch"
      head="What is fitted differs from what the machine is specified to have."
      className={className}
    >
      {differences.map((words) => (
        <p key={words} className="pt-1">
          {words}
        </p>
      ))}
    </Notice>
  );
}
