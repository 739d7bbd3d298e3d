import { useQuery } from '@tanstack/react-query';
import type { MachinePage } from '#shared/schemas/homes.ts';
import { machineRunsQuery } from '../../api/machines.ts';
import { Empty } from '../../components/printed-paper.tsx';
import { SectionHead } from '../../components/section-head.tsx';
import { Failed, Waiting } from '../../components/waiting.tsx';
import { useNowMs } from '../../format/use-now.ts';
import { RunRows } from '../../records/run-rows.tsx';
import { useSession } from '../frame/session-context.ts';

/** Every run of the machine, newest first; the printed paper where there is none. */
export function MachineRuns({ machine }: { machine: MachinePage }) {
  const { zone } = useSession().shop;
  const nowMs = useNowMs();
  const runs = useQuery(machineRunsQuery(machine.id));
  if (runs.isPending) return <Waiting>Fetching the runs…</Waiting>;
  if (runs.isError) return <Failed error={runs.error} onRetry={runs.refetch} />;
  if (runs.data.length === 0) return <NoRun machine={machine} />;
  return (
    <section>
      <SectionHead state={runs.data.length === 1 ? '1 run' : `${runs.data.length} runs`}>
        Runs
      </SectionHead>
      <RunRows runs={runs.data} zone={zone} nowMs={nowMs} />
    </section>
  );
}

function NoRun({ machine }: { machine: MachinePage }) {
  const [high] = machine.specified;
  return (
    <Empty head="No run on this machine yet.">
      <p>
        {high
          ? `The bands of a run are printed from ${high.rating.name}, which the machine is specified to have. `
          : 'Set below which thermostat the machine is specified to have, so that a run can be judged. '}
        A run is uploaded on a visit; about 15 minutes show three cycles.
      </p>
    </Empty>
  );
}
