"use client";

import { Select } from "@/components/ui/controls";
import { Facts } from "@/components/ui/facts";
import { Field } from "@/components/ui/field";
import { Note } from "@/components/ui/note";
import { Panel } from "@/components/ui/panel";
import type { Bench } from "@/lib/schemas/bench";
import { formatDuration, formatTestVolts, THIN_SPACE } from "@/lib/units/format";
import { excludedGroups } from "./excluded-groups";
import { worstRatio } from "./forecast-recipe";
import { shortOhms } from "./recipe-words";
import type { ForecastChoice } from "./use-forecast";

/** Groups of left-out points that are named before the rest is only counted. */
const NAMED_GROUPS = 4;

interface ForecastPanelProps {
  choice: ForecastChoice;
  benches: readonly Bench[];
}

/** How long a recipe takes, how many points are run, and which are not. */
export function ForecastPanel({ choice, benches }: ForecastPanelProps) {
  const { forecast } = choice;
  return (
    <Panel title={forecast ? `Forecast on ${forecast.bench.name}` : "Forecast"}>
      {forecast ? (
        <ForecastFigures {...{ choice, benches }} />
      ) : (
        <p className="text-ink-2">Stands here as soon as the recipe has its points.</p>
      )}
    </Panel>
  );
}

function ForecastFigures({ choice, benches }: ForecastPanelProps) {
  const { bench, model, plan, seconds } = choice.forecast!;
  const worst = worstRatio(plan);
  const [number = "", ...unit] = formatDuration(seconds).split(THIN_SPACE);
  return (
    <div className="grid gap-3">
      <p className="flex items-baseline gap-1.5">
        <span className="text-time font-[650] tabular">{number}</span>
        <span className="text-[1rem] font-medium text-ink-2">{unit.join(" ")}</span>
        <span className="ml-2 text-ink-2">with a {`${model.maker} ${model.model}`}</span>
      </p>
      <Facts
        facts={[
          { term: "Points", value: plan.points.length, mono: true },
          { term: "Left out", value: plan.excluded.length, mono: true },
          {
            term: "Worst TUR",
            value:
              worst &&
              `${worst.ratio.toPrecision(2)} at ${shortOhms(worst.point.nominalOhms)}, ${formatTestVolts(worst.point.testVolts)}`,
            mono: true,
          },
        ]}
      />
      <div className="grid grid-cols-2 gap-3">
        <Field label="Bench">
          <Select value={bench.id} onChange={(event) => choice.chooseBench(event.target.value)}>
            {benches.map(({ id, name }) => (
              <option key={id} value={id}>
                {name}
              </option>
            ))}
          </Select>
        </Field>
        <Field label="Model">
          <Select value={model.id} onChange={(event) => choice.chooseModel(event.target.value)}>
            {choice.models.map(({ id, maker, model: name }) => (
              <option key={id} value={id}>
                {maker} {name}
              </option>
            ))}
          </Select>
        </Field>
      </div>
      <ForcedNotes choice={choice} />
    </div>
  );
}

function ForcedNotes({ choice }: Pick<ForecastPanelProps, "choice">) {
  const groups = excludedGroups(choice.forecast!.plan.excluded.filter(({ cause }) => cause !== "recipe"));
  const rest = groups.slice(NAMED_GROUPS).reduce((sum, { count }) => sum + count, 0);
  return (
    <>
      {groups.slice(0, NAMED_GROUPS).map(({ cells, reason }) => (
        <Note key={`${cells} ${reason}`} tone="look" className="text-small">
          {cells}: {reason}.
        </Note>
      ))}
      {rest > 0 && <p className="text-label text-ink-2">And {rest} more points that this bench leaves out.</p>}
    </>
  );
}
