import type { ReactNode } from "react";
import { classNames } from "@/components/ui/class-names";

/** The margins of a signed-in page. */
export function PageFrame({ className, children }: { className?: string; children: ReactNode }) {
  return (
    <main
      className={classNames(
        "mx-auto grid w-full max-w-[1600px] content-start gap-3 px-6 pt-4 pb-8 max-sm:px-4",
        className,
      )}
    >
      {children}
    </main>
  );
}
