import type { InputHTMLAttributes, ReactNode } from "react";
import { classNames } from "./class-names";

export interface CheckboxProps extends Omit<InputHTMLAttributes<HTMLInputElement>, "type" | "children"> {
  children: ReactNode;
  ref?: React.Ref<HTMLInputElement>;
}

export function Checkbox({ children, className, ...rest }: CheckboxProps) {
  return (
    <label className={classNames("flex cursor-pointer items-start gap-2.5 max-sm:min-h-12 max-sm:py-2", className)}>
      <span className="relative mt-px size-5 flex-none">
        <input
          type="checkbox"
          className="peer absolute inset-0 size-full appearance-none rounded border-[1.5px] border-line-strong bg-panel checked:border-water checked:bg-water disabled:border-line disabled:bg-sunken"
          {...rest}
        />
        <svg
          aria-hidden="true"
          viewBox="0 0 20 20"
          className="pointer-events-none absolute inset-0 hidden text-water-ink peer-checked:block"
        >
          <path d="M4.5 10.5l3.6 3.6L15.5 6" fill="none" stroke="currentColor" strokeWidth="2.4" />
        </svg>
      </span>
      <span>{children}</span>
    </label>
  );
}
