import { formatDuration, THIN_SPACE } from "@/lib/units/format";

/** A duration set large, its units small: `17 min`. */
export function TimeLarge({ seconds }: { seconds: number }) {
  const parts = formatDuration(seconds).replaceAll(THIN_SPACE, " ").split(" ");
  return (
    <p className="text-time font-[650] tabular">
      {parts.map((part, index) =>
        index % 2 === 0 ? (
          <span key={index} className={index > 0 ? "ml-2" : undefined}>
            {part}
          </span>
        ) : (
          <small key={index} className="ml-1.5 text-[0.58em] font-medium text-ink-2">
            {part}
          </small>
        ),
      )}
    </p>
  );
}
