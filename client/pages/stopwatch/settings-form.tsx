import { RHYTHMS_S, toRhythm } from '#shared/recorder/rhythm.ts';
import { Choice } from './choice.tsx';
import type { Preferences } from './preferences.ts';

type SettingsFormProps = {
  preferences: Preferences;
  onPrefer: (preferences: Preferences) => void;
};

const RHYTHMS = [
  { value: 'none', words: 'Never' },
  ...RHYTHMS_S.map((rhythm) => ({ value: String(rhythm), words: `${rhythm}\u00a0s` })),
];
const HANDS = [
  { value: 'right', words: 'Right hand' },
  { value: 'left', words: 'Left hand' },
] as const;

const SWITCHES = [
  { name: 'hasSound', words: 'Sound' },
  { name: 'hasTick', words: 'Soft tick when a reading is due' },
  { name: 'hasVibration', words: 'Vibration' },
  { name: 'hasKeyboard', words: 'Keys of a keyboard: figures, C, H, S, O, M, Backspace' },
] as const;

/** How the stopwatch asks, sounds and lies in the hand; kept on this device. */
export function SettingsForm({ preferences, onPrefer }: SettingsFormProps) {
  const prefer = (change: Partial<Preferences>) => onPrefer({ ...preferences, ...change });
  return (
    <div className="grid grid-cols-1 gap-px border border-print bg-rule">
      <Choice
        label="Ask for a reading every"
        name="rhythm"
        value={preferences.rhythm === null ? 'none' : String(preferences.rhythm)}
        options={RHYTHMS}
        onChoose={(value) =>
          prefer({ rhythm: value === 'none' ? null : (toRhythm(Number(value)) ?? null) })
        }
      />
      <Choice
        label="Keys laid out for the"
        name="hand"
        value={preferences.hand}
        options={HANDS}
        onChoose={(hand) => prefer({ hand })}
      />
      {SWITCHES.map(({ name, words }) => (
        <label
          key={name}
          className="words flex min-h-key cursor-pointer items-center gap-4 wrap-anywhere bg-strip px-3 text-[1.0625rem] leading-[1.25] font-medium"
        >
          <input
            type="checkbox"
            className="!size-7"
            checked={preferences[name]}
            onChange={(event) => prefer({ [name]: event.target.checked })}
          />
          {words}
        </label>
      ))}
    </div>
  );
}
