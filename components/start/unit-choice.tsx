"use client";

import { keepPreviousData, useQuery } from "@tanstack/react-query";
import { useDeferredValue, useState } from "react";
import { api } from "@/lib/client/api";
import { failureMessage } from "@/lib/client/api-error";
import type { Unit } from "@/lib/schemas/instrument";
import type { RunSummary } from "@/lib/schemas/run";
import { formatDay } from "@/components/runs-list/format-day";
import { lastRunWords, unitWords } from "./choice-words";
import { SearchChoice } from "./search-choice";

interface UnitChoiceProps {
  unit: Unit | null;
  onChoose: (unit: Unit | null) => void;
  /** Undefined while it is not known yet. */
  lastRun: RunSummary | null | undefined;
}

/** The unit under test, found by part of its asset or serial number. */
export function UnitChoice({ unit, onChoose, lastRun }: UnitChoiceProps) {
  const [search, setSearch] = useState("");
  const text = useDeferredValue(search.trim());
  const units = useQuery({
    queryKey: ["units", text],
    queryFn: ({ signal }) => api.units(text, signal),
    placeholderData: keepPreviousData,
  });
  return (
    <div className="grid gap-1">
      <label htmlFor="unit" className="text-[0.8125rem] leading-5 font-semibold">
        Unit under test
      </label>
      <SearchChoice
        id="unit"
        name="Unit under test"
        describedBy="unit-note"
        placeholder="Part of the asset or serial number, such as 0412"
        groups={[{ title: "", items: units.data ?? [] }]}
        value={unit}
        onChoose={onChoose}
        idOf={({ id }) => id}
        label={unitWords}
        detail={(entry) => `serial number ${entry.serialNumber}`}
        onSearch={setSearch}
        notice={noticeOf(units.isPending, units.error, text)}
      />
      <p id="unit-note" className="min-h-4 text-label text-ink-2">
        {unit && lastRun !== undefined
          ? `${lastRunWords(lastRun, formatDay)} Accuracy statement of ${unit.model.statementEdition}.`
          : unit && "Looking for its last run."}
      </p>
    </div>
  );
}

function noticeOf(isPending: boolean, error: Error | null, text: string): string {
  if (error) return `The units could not be fetched. ${failureMessage(error)}`;
  if (isPending) return "Looking for units.";
  return text ? `No unit has “${text}” in its asset number, serial number or model.` : "The register has no unit yet.";
}
