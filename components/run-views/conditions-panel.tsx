import Link from "next/link";
import { formatDay } from "@/components/runs-list/format-day";
import { settlingWords } from "@/components/recipe/recipe-words";
import { Facts } from "@/components/ui/facts";
import { Panel } from "@/components/ui/panel";
import type { RunState } from "@/lib/journal/run-state";
import type { Room } from "@/lib/schemas/bench";
import { formatExactDuration, THIN_SPACE } from "@/lib/units/format";
import { ruleWords } from "./decision-words";
import { conditionWords } from "./run-links";

/** Under what circumstances the run was made, as they were then. */
export function ConditionsPanel({ state }: { state: RunState }) {
  const { setup } = state;
  if (!setup) return null;
  const { unit, bench, recipe, room } = setup;
  const { maker, model, statementEdition } = unit.model;
  const { standard } = bench;
  return (
    <Panel title="Conditions" right={conditionWords(setup.condition)}>
      <Facts
        className="[&_dt]:whitespace-nowrap gap-y-1.5"
        facts={[
          { term: "Unit", value: `${maker} ${model}, ${unit.assetNumber}, serial number ${unit.serialNumber}` },
          { term: "Limits", value: `accuracy statement, edition ${statementEdition}` },
          {
            term: "Standard",
            value: `${standard.name}, serial number ${standard.serialNumber}`,
          },
          {
            term: "Certificate",
            value: `${standard.calibration.certificate}, calibrated ${isoDay(standard.calibration.calibratedOn)}, due ${isoDay(standard.calibration.dueOn)}`,
          },
          { term: "Bench", value: `${bench.name}, ${bench.room}` },
          { term: "Room", value: `${roomWords(room)} at the start` },
          {
            term: "Recipe",
            value: (
              <Link
                href={`/recipes/${encodeURIComponent(recipe.recipeId)}?version=${recipe.version}`}
                className="text-water underline underline-offset-3"
              >
                {recipe.document.name}, version {recipe.version}
              </Link>
            ),
          },
          { term: "Waiting", value: waitingWords(state) },
          { term: "Rule", value: ruleWords(setup.decisionRule).full },
          { term: "Started by", value: setup.by.name },
          { term: "Took", value: tookWords(state) },
        ]}
      />
    </Panel>
  );
}

function waitingWords({ setup }: RunState): string {
  const waits = new Set(setup?.recipe.document.sections.map(({ settling }) => settlingPhrase(settlingWords(settling))));
  return [...waits].join("; ");
}

function settlingPhrase({ name, detail }: { name: string; detail: string }): string {
  return `${name.charAt(0).toLowerCase()}${name.slice(1)}: ${detail}`;
}

function tookWords({ setup, elapsedMs, endedAtMs }: RunState): string | null {
  if (endedAtMs === null) return null;
  const speed = setup?.clockSpeed ?? 1;
  const took = formatExactDuration(elapsedMs / 1000);
  return speed === 1 ? took : `${took} of simulated time, which ran at ${speed}×`;
}

function roomWords({ celsius, humidityPercent }: Room): string {
  const humidity = humidityPercent === null ? "" : `, ${humidityPercent.toFixed(0)}${THIN_SPACE}% r.h.`;
  return `${celsius.toFixed(1)}${THIN_SPACE}°C${humidity}`;
}

/** A calendar day has no zone: it is read at noon, so that none can shift it. */
function isoDay(date: string): string {
  return formatDay(new Date(`${date}T12:00:00`).getTime());
}
