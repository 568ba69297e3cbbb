/** One figure, one line: `name value unit`. */
export function printFigure(name: string, value: number, unit: string): void {
  const digits = Math.abs(value) >= 100 ? 0 : Math.abs(value) >= 10 ? 1 : 3;
  process.stdout.write(`${name} ${value.toFixed(digits)} ${unit}\n`);
}

/** The value below which a share of the samples lies (nearest rank). Throws RangeError without samples. */
export function percentile(samples: readonly number[], share: number): number {
  if (samples.length === 0) throw new RangeError("a percentile needs samples");
  const sorted = [...samples].sort((a, b) => a - b);
  return sorted[Math.min(sorted.length - 1, Math.ceil(share * sorted.length) - 1)]!;
}
