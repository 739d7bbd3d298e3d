type ChoiceProps<Value extends string> = {
  label: string;
  name: string;
  value: Value | null;
  options: readonly { value: Value; words: string }[];
  fault?: string | undefined;
  onChoose: (value: Value) => void;
};

/** One of a few, as a row of keys. */
export function Choice<Value extends string>(props: ChoiceProps<Value>) {
  const { label, name, value, options, fault, onChoose } = props;
  return (
    <fieldset
      id={`choice-${name}`}
      className={`relative bg-strip px-3 pt-2 pb-3 ${fault ? 'pl-5 before:absolute before:inset-y-0 before:left-0 before:w-1.5 before:bg-stop' : ''}`}
    >
      <legend className="lab float-left mb-1.5 w-full">{label}</legend>
      <div className="clear-both flex flex-wrap gap-1.5">
        {options.map((option) => (
          <label key={option.value} className="relative min-w-fit flex-1">
            <input
              type="radio"
              name={name}
              value={option.value}
              checked={option.value === value}
              onChange={() => onChoose(option.value)}
              className="peer absolute inset-0 size-full cursor-pointer opacity-0"
            />
            <span className="words grid min-h-key min-w-12 place-items-center rounded-key border-line border-print px-1 text-center text-[1.0625rem] leading-[1.1] font-medium peer-checked:border-ink peer-checked:bg-ink peer-checked:font-semibold peer-checked:text-paper peer-focus-visible:outline-3 peer-focus-visible:outline-offset-2 peer-focus-visible:outline-focus">
              {option.words}
            </span>
          </label>
        ))}
      </div>
      {fault && (
        <p className="pt-2 font-gothic text-[1rem] leading-[1.3] font-semibold text-stop">
          {fault}
        </p>
      )}
    </fieldset>
  );
}
