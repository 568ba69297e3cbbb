import { useId, type ReactNode } from "react";
import { classNames } from "./class-names";

export interface Choice<T extends string> {
  value: T;
  title: ReactNode;
  /** What follows from it. */
  note?: ReactNode;
  disabled?: boolean;
}

export interface RadioChoiceProps<T extends string> {
  legend: ReactNode;
  /** Hides the legend from sight where the page already says it. */
  legendHidden?: boolean;
  name?: string;
  value: T | null;
  choices: readonly Choice<T>[];
  onChange: (value: T) => void;
  error?: string | null;
  className?: string;
}

/** Few choices whose consequences need a sentence: all are in view. */
export function RadioChoice<T extends string>(props: RadioChoiceProps<T>) {
  const { legend, legendHidden = false, value, choices, onChange, error, className } = props;
  const made = useId();
  const name = props.name ?? made;
  return (
    <fieldset className={classNames("grid gap-1.5", className)} aria-describedby={error ? `${made}-error` : undefined}>
      <legend className={legendHidden ? "sr-only" : "mb-1 text-[0.8125rem] leading-5 font-semibold"}>{legend}</legend>
      {choices.map((choice) => (
        <ChoiceRow key={choice.value} name={name} choice={choice} isOn={choice.value === value} onChange={onChange} />
      ))}
      {error && (
        <p id={`${made}-error`} role="alert" className="text-small text-brick">
          {error}
        </p>
      )}
    </fieldset>
  );
}

interface ChoiceRowProps<T extends string> {
  name: string;
  choice: Choice<T>;
  isOn: boolean;
  onChange: (value: T) => void;
}

function ChoiceRow<T extends string>({ name, choice, isOn, onChange }: ChoiceRowProps<T>) {
  return (
    <label
      className={classNames(
        "relative flex cursor-pointer items-start gap-2.5 rounded border px-2.5 py-2 has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-water",
        isOn
          ? "border-water bg-water-tint before:absolute before:inset-y-0 before:left-0 before:w-[3px] before:bg-water"
          : "border-line bg-panel hover:border-line-strong",
        choice.disabled && "cursor-not-allowed bg-sunken text-ink-2",
      )}
    >
      <input
        type="radio"
        name={name}
        value={choice.value}
        checked={isOn}
        disabled={choice.disabled}
        onChange={() => onChange(choice.value)}
        className="mt-[3px] size-4 flex-none appearance-none rounded-[50%] border-[1.5px] border-line-strong bg-panel outline-none checked:border-[5px] checked:border-water"
      />
      <span>
        <span className="font-semibold">{choice.title}</span>
        {choice.note && <span className="block text-label text-ink-2">{choice.note}</span>}
      </span>
    </label>
  );
}
