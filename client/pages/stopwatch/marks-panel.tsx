import { useState, type SubmitEvent } from 'react';
import type { MarkKind } from '#shared/analysis/series.ts';
import { TextField } from '../../components/field.tsx';
import { Key } from '../../components/key.tsx';
import { formatAt } from './format-elapsed.ts';
import { Panel } from './panel.tsx';

const MARKS: readonly { kind: MarkKind; words: string }[] = [
  { kind: 'flame-on', words: 'Flame on' },
  { kind: 'heat-on', words: 'Heat on' },
  { kind: 'stopped', words: 'Machine stopped' },
  { kind: 'door', words: 'Door' },
  { kind: 'duct-off', words: 'Duct off' },
];

type MarksPanelProps = {
  /** When *Mark* was pressed: that is the moment marked. */
  atS: number;
  onMark: (kind: MarkKind, text: string | null) => void;
  onClose: () => void;
};

/** The rarer marks, a tap further away. */
export function MarksPanel({ atS, onMark, onClose }: MarksPanelProps) {
  const [isNote, setIsNote] = useState(false);
  function handleSubmit(event: SubmitEvent<HTMLFormElement>) {
    event.preventDefault();
    const text = String(new FormData(event.currentTarget).get('note') ?? '').trim();
    if (text !== '') onMark('note', text);
  }
  return (
    <Panel heading={`Mark ${formatAt(atS)}`} onClose={onClose}>
      {isNote ? (
        <form onSubmit={handleSubmit} className="grid gap-2">
          <TextField label="Note" name="note" maxLength={200} autoComplete="off" required />
          <Key type="submit" face="main" size="site">
            Keep the note
          </Key>
        </form>
      ) : (
        <div className="grid grid-cols-2 gap-2 max-[300px]:grid-cols-1">
          {MARKS.map(({ kind, words }) => (
            <Key key={kind} className="!min-h-[72px]" onClick={() => onMark(kind, null)}>
              {words}
            </Key>
          ))}
          <Key className="!min-h-[72px]" onClick={() => setIsNote(true)}>
            Note
          </Key>
        </div>
      )}
    </Panel>
  );
}
