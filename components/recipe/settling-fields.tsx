import { TextInput } from "@/components/ui/controls";
import { Field } from "@/components/ui/field";
import { RadioChoice, type Choice } from "@/components/ui/radio-choice";
import type { SettlingPolicy } from "@/lib/schemas/settling";
import type { FieldProblems } from "./parse-recipe-form";
import { settlingNumbers, type SettlingForm, type SettlingNumber } from "./recipe-form";

const kinds: readonly Choice<SettlingPolicy["kind"]>[] = [
  { value: "fixed", title: "Fixed wait", note: "the same time at every point" },
  { value: "scaled", title: "Scaled with R × C", note: "longer where resistance and capacitance are greater" },
  { value: "steady", title: "Until steady", note: "watches the display until drift and spread are small" },
];

const numberLabels: Readonly<Record<SettlingNumber, { label: string; unit: string }>> = {
  waitSeconds: { label: "Wait", unit: "s" },
  baseSeconds: { label: "Base wait", unit: "s" },
  timeConstants: { label: "Time constants", unit: "R × C" },
  driftPercentPerMinute: { label: "Drift under", unit: "% a minute" },
  spreadPercent: { label: "Spread under", unit: "%" },
  displayUpdates: { label: "Over", unit: "display steps" },
  leastSeconds: { label: "At least", unit: "s" },
  mostSeconds: { label: "At most", unit: "s" },
};

interface SettlingFieldsProps {
  settling: SettlingForm;
  onChange: (settling: SettlingForm) => void;
  problems: FieldProblems;
}

/** How long a point waits before its readings count. */
export function SettlingFields({ settling, onChange, problems }: SettlingFieldsProps) {
  return (
    <div className="grid gap-3">
      <RadioChoice
        legend="Settling policy"
        legendHidden
        value={settling.kind}
        choices={kinds}
        onChange={(kind) => onChange({ ...settling, kind })}
      />
      <div className="grid grid-cols-2 gap-3">
        {settlingNumbers[settling.kind].map((name) => (
          <Field
            key={name}
            label={
              <>
                {numberLabels[name].label}
                <span className="font-normal text-ink-2">, {numberLabels[name].unit}</span>
              </>
            }
            error={problems[name]?.join(" ")}
          >
            <TextInput
              mono
              inputMode="decimal"
              value={settling[name]}
              onChange={(event) => onChange({ ...settling, [name]: event.target.value })}
            />
          </Field>
        ))}
      </div>
    </div>
  );
}
