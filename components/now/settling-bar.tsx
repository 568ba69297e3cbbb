export interface SettlingBarProps {
  /** 0 to 1. */
  progress: number;
  /** What is still missing, or how it settled. */
  sentence: string;
}

/** How near the point is to settled, and what is still missing. */
export function SettlingBar({ progress, sentence }: SettlingBarProps) {
  const percent = Math.round(Math.min(1, Math.max(0, progress)) * 100);
  return (
    <div>
      <div className="flex items-end justify-between gap-4 text-label text-ink-2">
        {/* Room for two lines, so that nothing below moves as the sentence changes. */}
        <p className="flex min-h-8 items-end">{sentence}</p>
        <span aria-hidden="true" className="flex-none font-mono tabular">
          {percent} %
        </span>
      </div>
      <div
        role="progressbar"
        aria-label="Settled"
        aria-valuemin={0}
        aria-valuemax={100}
        aria-valuenow={percent}
        aria-valuetext={`${percent} %: ${sentence}`}
        className="mt-1 h-2 overflow-hidden rounded bg-sunken"
      >
        <div className="h-full bg-water transition-[width] duration-200" style={{ width: `${percent}%` }} />
      </div>
    </div>
  );
}
