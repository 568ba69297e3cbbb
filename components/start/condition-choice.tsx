import { conditionWords } from "@/components/runs-list/run-words";
import { Segmented } from "@/components/ui/segmented";
import type { RunCondition } from "@/lib/schemas/run-event";
import { Labelled } from "./labelled";

interface ConditionChoiceProps {
  condition: RunCondition;
  onChoose: (condition: RunCondition) => void;
}

const segments = (["as-found", "as-left"] as const).map((value) => ({ value, label: conditionWords[value] }));

/** As found: as it came in. As left: after adjustment or repair, as it goes out. */
export function ConditionChoice({ condition, onChoose }: ConditionChoiceProps) {
  return (
    <Labelled label="Condition">
      <Segmented label="Condition" segments={segments} value={condition} onChange={onChoose} />
    </Labelled>
  );
}
