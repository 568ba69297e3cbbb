"use client";

import { useState, type ReactNode } from "react";
import { Panel } from "@/components/ui/panel";
import { Segmented } from "@/components/ui/segmented";
import type { Plan } from "@/lib/schemas/plan";
import type { MatrixCell } from "@/lib/schemas/recipe";
import type { Ohms, Volts } from "@/lib/units/quantities";
import { cellsOf, overlayDepth, overlays, overlayText, type Overlay } from "./cell-overlay";
import { RecipeMatrix } from "./recipe-matrix";

interface PointsPanelProps {
  nominalOhms: readonly Ohms[];
  testVolts: readonly Volts[];
  isIncluded: (cell: MatrixCell) => boolean;
  plan: Plan | null;
  onChange?: (cells: readonly MatrixCell[], isIncluded: boolean) => void;
  /** Stands under the matrix. */
  children?: ReactNode;
}

const overlayNotes: Readonly<Record<Overlay, string>> = {
  time: "Time of each point: settling, readings and switching.",
  limit: "The unit’s limit at each point, by its accuracy statement.",
  uncertainty: "Expanded uncertainty of the standard at each point (k = 2).",
};

/** The matrix of a recipe, with one figure a point. */
export function PointsPanel({ plan, children, ...matrix }: PointsPanelProps) {
  const [overlay, setOverlay] = useState<Overlay>("time");
  const isEmpty = matrix.nominalOhms.length === 0 || matrix.testVolts.length === 0;
  return (
    <Panel
      title="Points"
      right={<Segmented label="Figure in the cells" segments={overlays} value={overlay} onChange={setOverlay} />}
      padding="flush"
    >
      <div className="grid gap-2 px-2.5 pt-2 pb-3">
        {isEmpty ? (
          <p className="px-1 py-6 text-ink-2">The matrix appears as soon as there are resistances and test voltages.</p>
        ) : (
          <>
            <RecipeMatrix
              {...matrix}
              cells={plan ? cellsOf(plan) : new Map()}
              describe={({ point }) => ({
                text: overlayText(point, overlay),
                depth: plan ? overlayDepth(point, overlay, plan) : 0,
              })}
            />
            <p className="flex flex-wrap items-center gap-x-4 gap-y-1 px-1 text-label text-ink-2">
              <span>{overlayNotes[overlay]}</span>
              <span className="inline-flex items-center gap-1.5">
                <span aria-hidden="true" className="excluded h-3.5 w-6 rounded border border-line" />
                left out
              </span>
            </p>
          </>
        )}
        {children}
      </div>
    </Panel>
  );
}
