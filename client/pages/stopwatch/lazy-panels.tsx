import { lazy, type ComponentType } from 'react';
import type { EndPanelProps } from './end-panel.tsx';
import { Panel } from './panel.tsx';
import type { RunPanelProps } from './run-panel.tsx';

/** Slips that are fetched while the run goes on; the first load goes without them. */
const fetchRunPanel = () => import('./run-panel.tsx');
const fetchEndPanel = () => import('./end-panel.tsx');

type Fetched<Props> = { default: ComponentType<Props> };

export const RunPanel = lazy((): Promise<Fetched<RunPanelProps>> =>
  fetchRunPanel().then(
    (chunk): Fetched<RunPanelProps> => ({ default: chunk.RunPanel }),
    (): Fetched<RunPanelProps> => ({ default: Unfetched }),
  ),
);
export const EndPanel = lazy((): Promise<Fetched<EndPanelProps>> =>
  fetchEndPanel().then(
    (chunk): Fetched<EndPanelProps> => ({ default: chunk.EndPanel }),
    (): Fetched<EndPanelProps> => ({ default: Unfetched }),
  ),
);

/** Early in the run, so that they open without a network. A failure is told when one is opened. */
export function fetchPanels(): void {
  void Promise.allSettled([fetchRunPanel(), fetchEndPanel()]);
}

function Unfetched({ onClose }: { onClose: () => void }) {
  return (
    <Panel heading="This could not be fetched" onClose={onClose}>
      <p className="px-1 text-say">
        The run goes on. When the network is back, reload the page: nothing is lost by it.
      </p>
    </Panel>
  );
}
