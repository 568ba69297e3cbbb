import { Fragment, type ReactNode } from "react";
import { classNames } from "./class-names";

export interface Fact {
  term: ReactNode;
  value: ReactNode;
  /** A reading or a number: set in the mono face. */
  mono?: boolean;
}

/** Terms and their values; a fact whose value is null or false is left out. */
export function Facts({
  facts,
  align = "left",
  className,
}: {
  facts: readonly Fact[];
  align?: "left" | "right";
  className?: string;
}) {
  return (
    <dl
      className={classNames(
        "grid grid-cols-[auto_1fr] gap-x-3.5 gap-y-0.5 text-small",
        align === "right" && "sm:text-right",
        className,
      )}
    >
      {facts
        .filter((fact) => fact.value !== null && fact.value !== undefined && fact.value !== false)
        .map((fact, index) => (
          <Fragment key={index}>
            <dt className="text-ink-2">{fact.term}</dt>
            <dd className={classNames("min-w-0", fact.mono && "font-mono tabular")}>{fact.value}</dd>
          </Fragment>
        ))}
    </dl>
  );
}
