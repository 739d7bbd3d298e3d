import { ClickPen, HeatOffPen, UndoPen } from './pen-signs.tsx';
import { PadKey } from './pad-key.tsx';

export type KeypadProps = {
  /** The last reading as it reads; null before the first. */
  same: string | null;
  /** Free entry: what stands in place of Same and Other. */
  free: { canMinus: boolean; canPoint: boolean; canKeep: boolean } | null;
  isHot: boolean;
  onFigure: (figure: string, downMonoMs: number) => void;
  onSame: (downMonoMs: number) => void;
  onOther: (downMonoMs: number) => void;
  onClickHeard: (downMonoMs: number) => void;
  onHeatOff: (downMonoMs: number) => void;
  onUndo: () => void;
};

const FIGURES = '1234567890'.split('');

/** The keys never move, appear or vanish while a run goes on. */
export function Keypad(props: KeypadProps) {
  const { free, isHot } = props;
  return (
    <div className="sw-pad" role="group" aria-label="Keypad">
      {FIGURES.map((figure) => (
        <PadKey
          key={figure}
          area={`k${figure}`}
          onPress={(downMonoMs) => props.onFigure(figure, downMonoMs)}
        >
          {figure}
        </PadKey>
      ))}
      <PadKey area="click" look="word" onPress={props.onClickHeard}>
        <ClickPen />
        <span>Click heard</span>
      </PadKey>
      <PadKey area="off" look={isHot ? 'hot' : 'word'} onPress={props.onHeatOff}>
        <HeatOffPen />
        <span>Heat off</span>
      </PadKey>
      {free ? <FreeKeys {...props} free={free} /> : <GuidedKeys {...props} />}
      <PadKey area="undo" look="word" onPress={props.onUndo}>
        <UndoPen />
        <span>Undo</span>
      </PadKey>
    </div>
  );
}

function GuidedKeys({ same, onSame, onOther }: KeypadProps) {
  return (
    <>
      <PadKey area="same" look="word" isDisabled={same === null} onPress={onSame}>
        <span>
          Same
          {same !== null && (
            <>
              <br />
              <b className="fig">{same}</b>
            </>
          )}
        </span>
      </PadKey>
      <PadKey area="other" look="word" onPress={onOther}>
        <span>
          Other
          <br />
          value
        </span>
      </PadKey>
    </>
  );
}

function FreeKeys({
  free,
  onSame,
  onOther,
}: KeypadProps & { free: NonNullable<KeypadProps['free']> }) {
  return (
    <>
      <PadKey
        area="same"
        look="word"
        isDisabled={!free.canMinus && !free.canPoint}
        onPress={onSame}
      >
        <span>{free.canPoint ? 'Point' : 'Minus'}</span>
      </PadKey>
      <PadKey area="other" look="word" onPress={onOther}>
        <span>{free.canKeep ? 'Keep it' : 'Go back'}</span>
      </PadKey>
    </>
  );
}
