import type { ReactNode } from "react";

/** For assistive technology only. */
export function VisuallyHidden({ children }: { children: ReactNode }) {
  return <span className="sr-only">{children}</span>;
}
