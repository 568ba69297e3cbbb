import { skipToken, useQuery } from "@tanstack/react-query";
import { api } from "@/lib/client/api";
import type { Unit } from "@/lib/schemas/instrument";
import { lastRunOf } from "./choice-words";

/** The latest ended run of a unit. */
export function useLastRun(unit: Unit | null) {
  return useQuery({
    queryKey: ["last-run", unit?.id],
    queryFn: unit
      ? async ({ signal }) => {
          const query = { search: unit.assetNumber, sort: "started", direction: "falling", pageSize: 100 } as const;
          const { rows } = await api.runs(query, signal);
          return { run: lastRunOf(unit.id, rows), askedAtMs: Date.now() };
        }
      : skipToken,
    staleTime: 60_000,
  });
}
