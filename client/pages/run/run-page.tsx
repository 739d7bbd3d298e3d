import { useParams } from 'react-router-dom';
import { SAFETY_LINE } from '#shared/wording/safety-lines.ts';
import { Failed, Waiting } from '../../components/waiting.tsx';
import { useSession } from '../frame/session-context.ts';
import { aboutOf } from './about-run.ts';
import { AfterStop } from './after-stop.tsx';
import { Cycles } from './cycles.tsx';
import { Findings } from './findings.tsx';
import { HowRead } from './how-read.tsx';
import { JudgedAgainst } from './judged-against.tsx';
import { RunFigure } from './run-figure.tsx';
import { RunPairs } from './run-pairs.tsx';
import { Shares } from './shares.tsx';
import { TitleBlock } from './title-block.tsx';
import { useRun, type RunHere } from './use-run.ts';

export function RunPage() {
  const { id = '' } = useParams();
  const { run, here } = useRun(id);

  if (here) return <RunSheet run={here} />;
  if (!run.isError) {
    return (
      <main id="main" className="px-4 desk:px-12">
        <Waiting>Fetching the run…</Waiting>
      </main>
    );
  }
  return (
    <main id="main" className="px-4 desk:px-12">
      <Failed error={run.error} onRetry={run.refetch} />
    </main>
  );
}

function RunSheet({ run }: { run: RunHere }) {
  const { shop, person } = useSession();
  const about = aboutOf(run, shop.unit);
  const mayShare = run.mayWrite || person.role === 'office';
  return (
    <main id="main" className="pb-12">
      <TitleBlock run={run} about={about} zone={shop.zone} />
      <AfterStop run={run} about={about} />
      <RunFigure run={run} unit={shop.unit} />
      <div className="grid gap-10 px-4 pt-6 desk:gap-11 desk:px-12">
        <Cycles run={run} unit={shop.unit} />
        <Findings run={run} about={about} />
        <RunPairs run={run} unit={shop.unit} zone={shop.zone} />
        <p className="border-y border-rule py-3 text-small">{SAFETY_LINE}</p>
        <div className="grid gap-10 desk:grid-cols-2 desk:gap-x-14">
          <JudgedAgainst run={run} unit={shop.unit} zone={shop.zone} />
          <HowRead run={run} unit={shop.unit} />
        </div>
        {mayShare && <Shares run={run} zone={shop.zone} shopName={shop.name} />}
      </div>
    </main>
  );
}
