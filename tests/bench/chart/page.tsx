import { createRoot } from 'react-dom/client';
import { flushSync } from 'react-dom';
import { ChartPanel } from '#client/chart/chart-panel.tsx';
import { buildPyramid } from '#client/chart/pyramid.ts';
import { EMPTY_STRIP } from '#client/chart/strip.ts';
import '#client/styles.css';

declare global {
  interface Window {
    fusekeeperBench: (readings: number) => Promise<{ builtMs: number; drawnMs: number }>;
    fusekeeperZoom: (frames: number) => Promise<{ framesMs: number[] }>;
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

window.fusekeeperBench = async (readings) => {
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
  await nextFrame();
  return { builtMs, drawnMs: performance.now() - drawMs };
};

/** In for a third of the frames, along for a third, out for a third: by the wheel, as a person does. */
window.fusekeeperZoom = async (frames) => {
  const over = document.querySelector<HTMLElement>('.u-over');
  if (!over) throw new Error('the chart did not come');
  const framesMs: number[] = [];
  const { left, top, width } = over.getBoundingClientRect();
  const place = { clientX: left + width * 0.4, clientY: top + 100 };
  let lastMs = await nextFrame();
  for (let i = 0; i < frames; i++) {
    const third = Math.floor((3 * i) / frames);
    const turn = { deltaX: third === 1 ? 40 : 0, deltaY: [-30, 0, 30][third] ?? 0 };
    const how = { ctrlKey: third !== 1, bubbles: true, cancelable: true };
    over.dispatchEvent(new WheelEvent('wheel', { ...turn, ...place, ...how }));
    const nowMs = await nextFrame();
    framesMs.push(nowMs - lastMs);
    lastMs = nowMs;
  }
  return { framesMs };
};
