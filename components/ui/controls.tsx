import type { InputHTMLAttributes, SelectHTMLAttributes, TextareaHTMLAttributes } from "react";
import { classNames } from "./class-names";

const CONTROL =
  "w-full rounded border border-line-strong bg-panel text-ink placeholder:text-ink-3 " +
  "aria-invalid:border-brick aria-invalid:bg-brick-tint disabled:border-line disabled:bg-sunken disabled:text-ink-2";

export interface TextInputProps extends InputHTMLAttributes<HTMLInputElement> {
  /** Readings and values that are compared letter by letter. */
  mono?: boolean;
  ref?: React.Ref<HTMLInputElement>;
}

export function TextInput({ mono = false, className, type = "text", ...rest }: TextInputProps) {
  return (
    <input
      type={type}
      className={classNames(CONTROL, "h-9 px-2.5 max-sm:h-12", mono && "font-mono tabular", className)}
      {...rest}
    />
  );
}

export interface TextAreaProps extends TextareaHTMLAttributes<HTMLTextAreaElement> {
  mono?: boolean;
  ref?: React.Ref<HTMLTextAreaElement>;
}

export function TextArea({ mono = false, className, rows = 3, ...rest }: TextAreaProps) {
  return (
    <textarea
      rows={rows}
      className={classNames(CONTROL, "px-2.5 py-1.5", mono && "font-mono tabular", className)}
      {...rest}
    />
  );
}

export interface SelectProps extends SelectHTMLAttributes<HTMLSelectElement> {
  ref?: React.Ref<HTMLSelectElement>;
}

/** The browser's own list, in our border. */
export function Select({ className, children, ...rest }: SelectProps) {
  return (
    <span className={classNames("relative block", className)}>
      <select className={classNames(CONTROL, "h-9 appearance-none pr-8 pl-2.5 max-sm:h-12")} {...rest}>
        {children}
      </select>
      <svg
        aria-hidden="true"
        viewBox="0 0 12 8"
        className="pointer-events-none absolute top-1/2 right-3 h-2 w-3 -translate-y-1/2 text-ink-2"
      >
        <path d="M1 1.5l5 5 5-5" fill="none" stroke="currentColor" strokeWidth="1.6" />
      </svg>
    </span>
  );
}
