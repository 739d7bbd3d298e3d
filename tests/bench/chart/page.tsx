import { createRoot } from 'react-dom/client';
import { flushSync } from 'react-dom';
import { ChartPanel } from '#client/chart/chart-panel.tsx';
import { buildPyramid } from '#client/chart/pyramid.ts';
import { EMPTY_STRIP } from '#client/chart/strip.ts';
import '#client/styles.css';

type Timing = { builtMs: number; drawnMs: number; framesMs: number[]; scriptMs: number[] };

declare global {
  interface Window {
    fusekeeperBench: (readings: number, frames: number) => Promise<Timing>;
  }
}

const BANDS = {
  opensC: 68.3,
  opensTolK: 2.8,
  closesC: 54.4,
  closesTolK: 2.8,
  highLimitC: 91.1,
};

/** A saw between 54 and 68 °C with a probe's noise; the same each time. */
function readingsOf(count: number) {
  const timesS = new Float64Array(count);
  const tempsC = new Float64Array(count);
  let seed = 12345;
  for (let i = 0; i < count; i++) {
    seed = (Math.imul(seed, 1_664_525) + 1_013_904_223) >>> 0;
    timesS[i] = i / 10;
    const share = (timesS[i]! % 150) / 150;
    tempsC[i] = 54 + 14 * (share < 0.7 ? share / 0.7 : (1 - share) / 0.3) + seed / 2 ** 33;
  }
  return { timesS, tempsC };
}

function nextFrame(): Promise<number> {
  return new Promise((resolve) => requestAnimationFrame(resolve));
}

window.fusekeeperBench = async (readings, frames) => {
  const { timesS, tempsC } = readingsOf(readings);
  const startMs = performance.now();
  const pyramid = buildPyramid(timesS, tempsC, []);
  const builtMs = performance.now() - startMs;

  const root = document.getElementById('root');
  if (!root) throw new Error('index.html has no #root');
  const drawMs = performance.now();
  flushSync(() =>
    createRoot(root).render(
      <ChartPanel
        strip={{ ...EMPTY_STRIP, bands: BANDS }}
        pyramid={pyramid}
        hasAllReadings
        durationS={readings / 10}
        unit="F"
        name="A million readings"
        onPick={null}
        actions={null}
      />,
    ),
  );
  const over = document.querySelector<HTMLElement>('.u-over');
  if (!over) throw new Error('the chart did not come');
  await nextFrame();
  const drawnMs = performance.now() - drawMs;
  return { builtMs, drawnMs, ...(await zoom(over, frames)) };
};

/** In for a third of the frames, along for a third, out for a third: by the wheel, as a person does. */
async function zoom(over: HTMLElement, frames: number) {
  const framesMs: number[] = [];
  const scriptMs: number[] = [];
  const { left, top, width } = over.getBoundingClientRect();
  let lastMs = await nextFrame();
  for (let i = 0; i < frames; i++) {
    const third = Math.floor((3 * i) / frames);
    const turn = { deltaX: third === 1 ? 40 : 0, deltaY: [-30, 0, 30][third] ?? 0 };
    const place = { clientX: left + width * 0.4, clientY: top + 100 };
    const beginMs = performance.now();
    over.dispatchEvent(
      new WheelEvent('wheel', {
        ...turn,
        ...place,
        ctrlKey: third !== 1,
        bubbles: true,
        cancelable: true,
      }),
    );
    await Promise.resolve();
    scriptMs.push(performance.now() - beginMs);
    const nowMs = await nextFrame();
    framesMs.push(nowMs - lastMs);
    lastMs = nowMs;
  }
  return { framesMs, scriptMs };
}
