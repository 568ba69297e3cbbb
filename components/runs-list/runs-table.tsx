import Link from "next/link";
import { StairLine } from "@/components/marks/stair-line";
import { VerdictMark } from "@/components/marks/verdict";
import { DataTable, TableHead, type Column } from "@/components/ui/data-table";
import type { RunQuery, RunSummary } from "@/lib/schemas/run";
import { formatDay, formatTimeOfDay } from "./format-day";
import { runQueryPath, sortedBy } from "./run-query-url";
import { conditionWords, countsInWords, markOf, statusWords } from "./run-words";

type RunColumn = RunQuery["sort"] | "condition" | "by" | "status" | "stairs";

const columns: readonly Column<RunColumn>[] = [
  { id: "number", label: "Run", align: "right", sortable: true, className: "w-14" },
  { id: "unit", label: "Unit", sortable: true },
  { id: "recipe", label: "Recipe", sortable: true, className: "max-lg:hidden" },
  { id: "bench", label: "Bench", sortable: true, className: "max-lg:hidden" },
  { id: "condition", label: "Condition", className: "max-xl:hidden" },
  { id: "started", label: "Started", sortable: true, className: "max-md:hidden" },
  { id: "by", label: "By", className: "max-xl:hidden" },
  { id: "stairs", label: "Stair line", labelHidden: true, className: "w-40 max-sm:hidden" },
  { id: "outside", label: "Points", sortable: true },
  { id: "status", label: "Status", className: "max-md:hidden" },
];

interface RunsTableProps {
  rows: readonly RunSummary[];
  query: RunQuery;
}

/** One row a run, newest first unless asked otherwise. On a narrow screen the lesser columns stand under the unit. */
export function RunsTable({ rows, query }: RunsTableProps) {
  return (
    <DataTable caption="Runs">
      <TableHead
        columns={columns}
        sort={{ column: query.sort, direction: query.direction }}
        hrefFor={({ column }) => runQueryPath(query, sortedBy(query, column as RunQuery["sort"]))}
      />
      <tbody>
        {rows.map((run) => (
          <RunRow key={run.id} run={run} />
        ))}
      </tbody>
    </DataTable>
  );
}

function RunRow({ run }: { run: RunSummary }) {
  const recipe = `${run.recipeName}, v${run.recipeVersion}`;
  return (
    <tr className="relative hover:bg-ground">
      <td className="figure">{run.number}</td>
      <th scope="row" className="py-1.5 text-left font-normal">
        <Link
          href={`/runs/${run.id}`}
          className="whitespace-nowrap text-ink no-underline after:absolute after:inset-0 hover:underline"
        >
          <b>{run.unitName}</b>, {run.assetNumber}
        </Link>
        <span className="block text-label text-ink-2 lg:hidden">
          {recipe} · {run.benchName}
        </span>
        <span className="block text-label text-ink-2 md:hidden">
          <Started run={run} /> · {statusWords[run.status]}
        </span>
      </th>
      <td className="max-lg:hidden">{recipe}</td>
      <td className="whitespace-nowrap max-lg:hidden">{run.benchName}</td>
      <td className="whitespace-nowrap max-xl:hidden">{conditionWords[run.condition]}</td>
      <td className="whitespace-nowrap max-md:hidden">
        <Started run={run} />
      </td>
      <td className="whitespace-nowrap max-xl:hidden">{run.startedBy}</td>
      <td className="py-1.5 max-sm:hidden">
        <StairLine groups={run.stairs} size="small" />
      </td>
      <td>
        <Counts run={run} />
      </td>
      <td className="whitespace-nowrap max-md:hidden">{statusWords[run.status]}</td>
    </tr>
  );
}

function Started({ run }: { run: RunSummary }) {
  return (
    <time dateTime={new Date(run.startedAtMs).toISOString()} className="tabular">
      {formatDay(run.startedAtMs)}, {formatTimeOfDay(run.startedAtMs)}
    </time>
  );
}

function Counts({ run: { counts, status } }: { run: RunSummary }) {
  const mark = markOf(counts);
  return (
    <span className="flex items-center gap-2">
      <span className="w-3 flex-none">{mark && <VerdictMark verdict={mark} />}</span>
      {countsInWords(counts, status)}
    </span>
  );
}
