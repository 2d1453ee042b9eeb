import { useId } from 'react';

interface SwitchProps<Value extends string> {
  /** What is being switched; read out, shown unless `isLabelHidden`. */
  label: string;
  isLabelHidden?: boolean;
  value: Value;
  onChange: (value: Value) => void;
  choices: readonly { value: Value; label: string }[];
}

/** Two to four views or settings side by side, one of them in force. Arrow keys move between them. */
export function Switch<Value extends string>(props: SwitchProps<Value>) {
  const { label, isLabelHidden = false, value, onChange, choices } = props;
  const name = useId();
  return (
    <fieldset className="flex flex-wrap items-center gap-x-3 gap-y-1">
      <legend className={isLabelHidden ? 'sr-only' : 'float-left text-ink-2'}>{label}</legend>
      <div className="inline-flex border border-rule bg-raised">
        {choices.map((choice) => (
          <label
            key={choice.value}
            className="flex min-h-7 items-center px-2 text-ink-2 has-checked:bg-ink has-checked:text-paper has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-brass pointer-coarse:min-h-11"
          >
            <input
              type="radio"
              className="sr-only"
              name={name}
              value={choice.value}
              checked={choice.value === value}
              onChange={() => onChange(choice.value)}
            />
            {choice.label}
          </label>
        ))}
      </div>
    </fieldset>
  );
}
