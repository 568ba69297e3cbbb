"use client";

import { useEffect, useRef } from "react";
import uPlot from "uplot";
import "uplot/dist/uPlot.min.css";
import { readColours, watchTheme, type ChartColours } from "./chart-colours";

/** What the drawing hooks read while they draw: the latest frame and the theme's colours. */
export interface PlotReader<Frame> {
  frame: () => Frame;
  colours: () => ChartColours;
}

export type PlotOptions = Omit<uPlot.Options, "width" | "height">;

/** How a kind of chart is drawn; made once per chart, outside of React. */
export interface PlotKind<Frame> {
  options: (read: PlotReader<Frame>) => PlotOptions;
  data: (frame: Frame) => uPlot.AlignedData;
}

export interface PlotProps<Frame> {
  kind: PlotKind<Frame>;
  frame: Frame;
  height: number;
}

/** A canvas that follows its frame, its width and the theme, and is destroyed with its place. Hidden from assistive technology. */
export function Plot<Frame>({ kind, frame, height }: PlotProps<Frame>) {
  const place = useRef<HTMLDivElement>(null);
  const latest = useRef(frame);
  const chart = useRef<uPlot | null>(null);
  useEffect(() => {
    const element = place.current!;
    const made = makeChart(kind, element, height, () => latest.current);
    chart.current = made.chart;
    return () => {
      chart.current = null;
      made.destroy();
    };
  }, [kind, height]);
  useEffect(() => {
    latest.current = frame;
    chart.current?.setData(kind.data(frame));
  }, [kind, frame]);
  return <div ref={place} aria-hidden="true" style={{ height }} className="w-full overflow-hidden" />;
}

function makeChart<Frame>(kind: PlotKind<Frame>, element: HTMLElement, height: number, frame: () => Frame) {
  let colours = readColours(element);
  const options = kind.options({ frame, colours: () => colours });
  const size = () => ({ width: Math.max(1, element.clientWidth), height });
  const chart = new uPlot({ ...options, ...size() }, kind.data(frame()), element);
  const resize = new ResizeObserver(() => {
    if (element.clientWidth > 0 && element.clientWidth !== chart.width) chart.setSize(size());
  });
  resize.observe(element);
  const redraw = () => {
    colours = readColours(element);
    chart.redraw(false, true);
  };
  const endTheme = watchTheme(redraw);
  // Text drawn before the faces have arrived would stay in the fallback face.
  void document.fonts.ready.then(redraw);
  return {
    chart,
    destroy: () => {
      endTheme();
      resize.disconnect();
      chart.destroy();
    },
  };
}
