import { cloneElement, useId, type ReactElement, type ReactNode } from "react";
import { classNames } from "./class-names";

/** What a control takes from the field around it. */
export interface ControlProps {
  id?: string;
  "aria-describedby"?: string;
  "aria-invalid"?: boolean;
}

export interface FieldProps {
  label: ReactNode;
  hint?: ReactNode;
  /** What would be right, in a sentence. */
  error?: string | null;
  /** Said after the label of a field that may stay empty. */
  optional?: boolean;
  className?: string;
  /** One control: TextInput, TextArea, Select or any element that takes ControlProps. */
  children: ReactElement<ControlProps>;
}

/** Label, control, hint and error; the control learns its id and what describes it. */
export function Field({ label, hint, error, optional = false, className, children }: FieldProps) {
  const made = useId();
  const id = children.props.id ?? made;
  const describedBy = [error ? `${id}-error` : null, hint ? `${id}-hint` : null].filter(Boolean).join(" ");
  return (
    <div className={classNames("grid content-start gap-1", className)}>
      <label htmlFor={id} className="text-[0.8125rem] leading-5 font-semibold">
        {label}
        {optional && <span className="font-normal text-ink-2"> (may stay empty)</span>}
      </label>
      {cloneElement(children, {
        id,
        "aria-describedby": describedBy || undefined,
        "aria-invalid": error ? true : undefined,
      })}
      <FieldError id={`${id}-error`} message={error} />
      {hint && (
        <p id={`${id}-hint`} className="text-label text-ink-2">
          {hint}
        </p>
      )}
    </div>
  );
}

/** The error at its field, announced when it appears. */
export function FieldError({ id, message }: { id?: string; message?: string | null }) {
  if (!message) return null;
  return (
    <p id={id} role="alert" className="text-small text-brick">
      {message}
    </p>
  );
}
