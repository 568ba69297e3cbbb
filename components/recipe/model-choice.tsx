import { Checkbox } from "@/components/ui/checkbox";
import { FieldError } from "@/components/ui/field";
import type { UnitModel } from "@/lib/schemas/instrument";
import { formatTestVolts } from "@/lib/units/format";
import { listWords } from "./recipe-words";

interface ModelChoiceProps {
  models: readonly UnitModel[];
  chosen: readonly string[];
  onChange: (modelIds: string[]) => void;
  problems: readonly string[] | undefined;
}

/** The models of unit that a recipe is offered for first. */
export function ModelChoice({ models, chosen, onChange, problems = [] }: ModelChoiceProps) {
  return (
    <fieldset className="grid gap-1.5" aria-describedby="models-hint">
      <legend className="mb-1 text-[0.8125rem] leading-5 font-semibold">For which models</legend>
      {models.map(({ id, maker, model, testVolts }) => (
        <Checkbox
          key={id}
          checked={chosen.includes(id)}
          onChange={(event) =>
            onChange(event.target.checked ? [...chosen, id] : chosen.filter((other) => other !== id))
          }
        >
          {maker} {model}
          <span className="block text-label text-ink-2">{listWords(testVolts.map(formatTestVolts))}</span>
        </Checkbox>
      ))}
      <FieldError message={problems.join(" ")} />
      <p id="models-hint" className="text-label text-ink-2">
        It is offered first for these. Without a mark it is offered for all, and its voltages are not checked.
      </p>
    </fieldset>
  );
}
