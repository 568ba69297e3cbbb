"use client";

import { useMemo, useState } from "react";
import type { RunState } from "@/lib/journal/run-state";
import { formatTestVolts } from "@/lib/units/format";
import { Plot } from "@/components/chart/plot";
import { Select } from "@/components/ui/controls";
import { errorChartKind } from "./error-chart-kind";
import { errorSeries, middleVolts, resistancesOf, type ErrorSeries } from "./error-series";
import { ErrorTable } from "./error-table";

export interface ErrorChartProps {
  state: RunState;
  height?: number;
}

/** Errors against resistance, a line for each test voltage, within the limits of one of them; its table stands below. */
export function ErrorChart({ state, height = 330 }: ErrorChartProps) {
  const series = useMemo(() => errorSeries(state), [state]);
  const [chosen, setChosen] = useState<number | null>(null);
  const limitVolts = chosen ?? middleVolts(series);
  const frame = useMemo(() => ({ series, limitVolts }), [series, limitVolts]);
  return (
    <figure className="px-2 pt-2">
      {series.length > 1 && <LimitChoice series={series} limitVolts={limitVolts} onChoose={setChosen} />}
      <Plot kind={errorChartKind} frame={frame} height={height} />
      <figcaption className="sr-only">{describeErrors(series)}</figcaption>
      <details className="px-1.5 pb-2 text-small">
        <summary className="w-max text-water">As a table</summary>
        <ErrorTable series={series} />
      </details>
    </figure>
  );
}

interface LimitChoiceProps {
  series: readonly ErrorSeries[];
  limitVolts: number | null;
  onChoose: (volts: number) => void;
}

function LimitChoice({ series, limitVolts, onChoose }: LimitChoiceProps) {
  return (
    <label className="flex items-center justify-end gap-2 px-1.5 text-label text-ink-2" data-screen-only>
      Limits at
      <Select
        value={limitVolts ?? ""}
        onChange={(event) => onChoose(Number(event.target.value))}
        className="w-28 text-text"
      >
        {series.map(({ testVolts }) => (
          <option key={testVolts} value={testVolts}>
            {formatTestVolts(testVolts)}
          </option>
        ))}
      </Select>
    </label>
  );
}

function describeErrors(series: readonly ErrorSeries[]): string {
  const outside = series.flatMap(({ points }) => points).filter((point) => point.verdict === "outside").length;
  const volts = series.map(({ testVolts }) => formatTestVolts(testVolts)).join(", ");
  return `Errors in per cent at ${resistancesOf(series).length} resistances and ${volts}: ${outside} points outside. The table below has them all.`;
}
