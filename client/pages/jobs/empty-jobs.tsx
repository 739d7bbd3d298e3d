import { KeyLink } from '../../components/key-link.tsx';
import { Empty } from '../../components/printed-paper.tsx';

export function EmptyJobs({ mayTake }: { mayTake: boolean }) {
  if (!mayTake) {
    return (
      <Empty head="No job is yours yet.">
        <p>A job stands here once the office has booked you a visit on it.</p>
      </Empty>
    );
  }
  return (
    <Empty
      head="No job yet."
      keys={
        <KeyLink to="/jobs/new" face="main">
          Take the first call
        </KeyLink>
      }
    >
      <p>
        A call becomes a job: the customer, the home, the machine, what they complain of, and the
        first visit. Each can be added as you go.
      </p>
    </Empty>
  );
}
