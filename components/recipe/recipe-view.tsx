"use client";

import type { ReactNode } from "react";
import { Facts } from "@/components/ui/facts";
import { Panel } from "@/components/ui/panel";
import { isLeftOut } from "@/lib/planning/plan";
import type { Bench } from "@/lib/schemas/bench";
import type { UnitModel } from "@/lib/schemas/instrument";
import type { RecipeVersion } from "@/lib/schemas/recipe";
import { ForecastPanel } from "./forecast-panel";
import { PointsPanel } from "./points-panel";
import { modelNames, orderWords, ruleWords, settlingWords, understoodOhms, understoodVolts } from "./recipe-words";
import { useForecast } from "./use-forecast";

interface RecipeViewProps {
  recipe: RecipeVersion;
  benches: readonly Bench[];
  models: readonly UnitModel[];
  /** Its history. */
  children: ReactNode;
}

/** One version of a recipe: its points left, how it is run, what it takes and its history right. */
export function RecipeView({ recipe, benches, models, children }: RecipeViewProps) {
  const { document, modelIds } = recipe;
  const section = document.sections[0]!;
  const choice = useForecast({ document, modelIds, benches, models });
  const settling = settlingWords(section.settling);
  return (
    <div className="grid items-start gap-4 lg:grid-cols-[minmax(0,1fr)_350px]">
      <PointsPanel
        nominalOhms={section.nominalOhms}
        testVolts={section.testVolts}
        isIncluded={(cell) => !isLeftOut(section, cell)}
        plan={choice.forecast?.plan ?? null}
      />
      <div className="grid gap-4">
        <Panel title="How it is run">
          <Facts
            facts={[
              { term: "Resistances", value: understoodOhms(section.nominalOhms) },
              { term: "Voltages", value: understoodVolts(section.testVolts) },
              {
                term: "Settling",
                value: (
                  <>
                    <b>{settling.name}</b>: {settling.detail}
                  </>
                ),
              },
              { term: "Readings", value: `${section.readingsPerPoint} a point, averaged` },
              { term: "Order", value: `${orderWords[section.order]}, rising` },
              { term: "Judged by", value: ruleWords(document.decisionRule) },
              { term: "For", value: modelNames(modelIds, models) },
            ]}
          />
        </Panel>
        <ForecastPanel choice={choice} benches={benches} />
        {children}
      </div>
    </div>
  );
}
