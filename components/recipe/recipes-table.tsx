import Link from "next/link";
import { formatDay } from "@/components/runs-list/format-day";
import { DataTable, TableHead, type Column } from "@/components/ui/data-table";
import type { UnitModel } from "@/lib/schemas/instrument";
import type { RecipeVersion } from "@/lib/schemas/recipe";
import { formatDuration } from "@/lib/units/format";
import type { RecipeForecast } from "./forecast-recipe";
import { countPoints } from "./recipe-form";
import { modelNames, stateWords } from "./recipe-words";

export interface RecipeRow {
  recipe: RecipeVersion;
  forecast: RecipeForecast | null;
}

const columns: readonly Column[] = [
  { id: "name", label: "Recipe" },
  { id: "version", label: "Version", align: "right", className: "w-20" },
  { id: "state", label: "State", className: "max-sm:hidden" },
  { id: "points", label: "Points", align: "right", className: "w-20" },
  { id: "models", label: "For", className: "max-md:hidden" },
  { id: "forecast", label: "Forecast", className: "max-sm:hidden" },
  { id: "changed", label: "Last changed", className: "max-lg:hidden" },
];

interface RecipesTableProps {
  rows: readonly RecipeRow[];
  models: readonly UnitModel[];
}

/** The newest version of each recipe. */
export function RecipesTable({ rows, models }: RecipesTableProps) {
  return (
    <DataTable caption="Recipes">
      <TableHead columns={columns} />
      <tbody>
        {rows.map((row) => (
          <Row key={row.recipe.id} row={row} models={models} />
        ))}
      </tbody>
    </DataTable>
  );
}

function Row({ row: { recipe, forecast }, models }: { row: RecipeRow; models: readonly UnitModel[] }) {
  const { recipeId, document, version, state, modelIds, changedBy, changedAtMs } = recipe;
  const time = forecast ? `${formatDuration(forecast.seconds)} on ${forecast.bench.name}` : "no bench runs it";
  return (
    <tr className="relative hover:bg-ground">
      <th scope="row" className="py-1.5 text-left font-normal">
        <Link
          href={`/recipes/${recipeId}`}
          className="font-semibold text-ink no-underline after:absolute after:inset-0 hover:underline"
        >
          {document.name}
        </Link>
        <span className="block text-label text-ink-2">{document.purpose}</span>
        <span className="block text-label text-ink-2 sm:hidden">
          {stateWords[state]}, {time}
        </span>
      </th>
      <td className="figure">{version}</td>
      <td className="max-sm:hidden">{stateWords[state]}</td>
      <td className="figure">{document.sections.reduce((sum, section) => sum + countPoints(section), 0)}</td>
      <td className="max-md:hidden">{modelNames(modelIds, models)}</td>
      <td className="max-sm:hidden">{time}</td>
      <td className="whitespace-nowrap max-lg:hidden">
        {formatDay(changedAtMs)} <span className="text-ink-2">{changedBy}</span>
      </td>
    </tr>
  );
}
