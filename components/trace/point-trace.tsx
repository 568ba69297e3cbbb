"use client";

import { Plot } from "@/components/chart/plot";
import { pointTraceKind } from "./point-trace-kind";
import { describeTrace, type PointTraceData } from "./trace-frame";

export interface PointTraceProps {
  data: PointTraceData;
  /** CSS pixels. */
  height?: number;
}

/** Indication against time since the output was switched on, with what it is judged by. */
export function PointTrace({ data, height = 320 }: PointTraceProps) {
  return (
    <figure className="px-2 pt-2">
      <Plot kind={pointTraceKind} frame={data} height={height} />
      <figcaption className="sr-only">{describeTrace(data)}</figcaption>
    </figure>
  );
}
