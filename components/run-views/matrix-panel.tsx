import type { ReactNode } from "react";
import { Matrix } from "@/components/matrix/matrix";
import { Panel } from "@/components/ui/panel";
import type { RunState } from "@/lib/journal/run-state";
import { ruleWords } from "./decision-words";

export interface MatrixPanelProps {
  state: RunState;
  note?: ReactNode;
  onSelect?: (pointIndex: number) => void;
  selected?: number | null;
  stale?: boolean;
}

export function MatrixPanel({ state, note = "error, % of the standard’s value", ...matrix }: MatrixPanelProps) {
  const rule = state.setup?.decisionRule;
  return (
    <Panel
      title="Matrix"
      note={note}
      right={rule && `limits: unit statement · rule: ${ruleWords(rule).short}`}
      padding="flush"
    >
      <Matrix state={state} caption="Matrix of errors in per cent of the standard’s value" {...matrix} />
    </Panel>
  );
}
