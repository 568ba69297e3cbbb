/** Three steps and a water line. */
export function StepwellMark({ className = "size-6.5" }: { className?: string }) {
  return (
    <svg viewBox="0 0 26 26" aria-hidden="true" className={className}>
      <path d="M2 3h7v6h6v6h6v5" fill="none" stroke="currentColor" strokeWidth="3" />
      <path d="M2 23.5h22" className="stroke-water" strokeWidth="3" />
    </svg>
  );
}
