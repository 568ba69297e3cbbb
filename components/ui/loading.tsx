import { classNames } from "./class-names";

/** Says what is being fetched. Holds the place, so that nothing jumps when it arrives. */
export function Loading({ what, className }: { what: string; className?: string }) {
  return (
    <p role="status" className={classNames("px-3.5 py-8 text-ink-2", className)}>
      Loading {what} …
    </p>
  );
}
