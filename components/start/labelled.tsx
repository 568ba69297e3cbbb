import type { ReactNode } from "react";

interface LabelledProps {
  label: string;
  hint?: string;
  children: ReactNode;
}

/** A caption over something that names itself for assistive technology. */
export function Labelled({ label, hint, children }: LabelledProps) {
  return (
    <div className="grid content-start gap-1">
      <span aria-hidden="true" className="text-[0.8125rem] leading-5 font-semibold">
        {label}
      </span>
      {children}
      {hint && <p className="text-label text-ink-2">{hint}</p>}
    </div>
  );
}
