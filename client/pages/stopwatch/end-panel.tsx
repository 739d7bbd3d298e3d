import { useState } from 'react';
import type { StoredProbe } from '#shared/schemas/ratings.ts';
import type { HandRun } from '#shared/recorder/replay-run.ts';
import type { EndSetup } from '#shared/recorder/run-event.ts';
import { SelectField, TextField } from '../../components/field.tsx';
import { Key } from '../../components/key.tsx';
import { Choice } from './choice.tsx';
import { formatAt } from './format-elapsed.ts';
import { Panel } from './panel.tsx';
import { HEATS, ProbeOptions } from './probe-options.tsx';

export type EndPanelProps = {
  run: HandRun;
  probes: StoredProbe[];
  onEnd: (label: string, setup: EndSetup) => void;
  onClose: () => void;
};

const PLACEMENTS = [
  { value: 'At the exhaust outlet', words: 'Exhaust outlet' },
  { value: 'In the duct behind the machine', words: 'In the duct' },
  { value: 'At the hood outside', words: 'Hood outside' },
] as const;
const ON_OFF = [
  { value: 'on', words: 'On' },
  { value: 'off', words: 'Off' },
] as const;
const LOADS = [
  { value: 'empty', words: 'Empty' },
  { value: 'damp', words: 'Damp load' },
] as const;

/** What was taken, and what is still to be said of it. The clock runs on until the run is ended. */
export function EndPanel({ run, probes, onEnd, onClose }: EndPanelProps) {
  const [setup, setSetup] = useState(run.start.setup);
  const [label, setLabel] = useState(run.start.label);
  const [roomText, setRoomText] = useState(setup.roomTemp === null ? '' : String(setup.roomTemp));
  const [isTried, setIsTried] = useState(false);
  const { duct, load, placement } = setup;
  const change = (part: Partial<typeof setup>) => setSetup({ ...setup, ...part });
  const roomTemp = roomText.trim() === '' ? null : Number(roomText.replace(',', '.'));
  const isRoomOdd = roomTemp !== null && !(Math.abs(roomTemp) <= 150);
  const isWhole = placement.trim() !== '' && label.trim() !== '' && !isRoomOdd;

  function handleEnd(): void {
    setIsTried(true);
    if (!isWhole || duct === null || load === null) return;
    onEnd(label.trim(), { ...setup, placement: placement.trim(), duct, load, roomTemp });
  }

  return (
    <Panel heading="End this run?" close="Go on reading" onClose={onClose}>
      <p className="px-1 pb-3 text-say">{takenSentence(run)}</p>
      <div className="grid grid-cols-1 gap-px border border-print bg-rule">
        <Choice
          label="Duct"
          name="duct"
          value={duct}
          options={ON_OFF}
          fault={isTried && duct === null ? 'Say whether the duct was on' : undefined}
          onChoose={(value) => change({ duct: value })}
        />
        <Choice
          label="Drum"
          name="load"
          value={load}
          options={LOADS}
          fault={isTried && load === null ? 'Say what was in the drum' : undefined}
          onChoose={(value) => change({ load: value })}
        />
        <Choice
          label="Heat setting"
          name="setting"
          value={setup.setting}
          options={HEATS}
          onChoose={(value) => change({ setting: value })}
        />
        <Choice
          label="Where the probe sat"
          name="placement"
          value={placementOf(placement)}
          options={PLACEMENTS}
          fault={isTried && placement.trim() === '' ? 'Say where the probe sat' : undefined}
          onChoose={(value) => change({ placement: value })}
        />
        <SelectField
          label="Probe"
          name="end-probe"
          value={setup.probeId ?? ''}
          onChange={(event) => change({ probeId: event.target.value || null })}
        >
          <ProbeOptions probes={probes} />
        </SelectField>
        <TextField
          label="Name of the run"
          name="end-label"
          maxLength={60}
          value={label}
          error={isTried && label.trim() === '' ? 'Enter a name for the run' : undefined}
          onChange={(event) => setLabel(event.target.value)}
        />
        <TextField
          label={`Room temperature, if read, °${run.start.unit}`}
          name="end-room"
          inputMode="decimal"
          autoComplete="off"
          value={roomText}
          error={isTried && isRoomOdd ? 'Enter a number' : undefined}
          onChange={(event) => setRoomText(event.target.value)}
        />
      </div>
      <Key face="main" size="site" className="mt-3 w-full" onClick={handleEnd}>
        End the run
      </Key>
    </Panel>
  );
}

function placementOf(placement: string) {
  return PLACEMENTS.find(({ value }) => value === placement)?.value ?? null;
}

function takenSentence({ readings, marks, corrections, last }: HandRun): string {
  const count = (n: number, one: string) => (n === 1 ? `1 ${one}` : `${n} ${one}s`);
  const corrected = corrections.length > 0 ? `, ${corrections.length} corrected` : '';
  return `${count(readings.length, 'reading')}${corrected} and ${count(marks.length, 'mark')} in ${formatAt(last.atS)}. All of it is on this phone.`;
}
