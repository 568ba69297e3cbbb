"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Select, TextInput } from "@/components/ui/controls";
import { Field } from "@/components/ui/field";
import type { SeriesName } from "@/lib/planning/series";
import { generateSeries } from "./generate-series";

const seriesNames: readonly SeriesName[] = ["1-2-5", "E6", "E12", "E24"];

/** Writes the resistances of a series instead of typing them. */
export function SeriesGenerator({ onGenerate }: { onGenerate: (values: readonly number[]) => void }) {
  const [series, setSeries] = useState<SeriesName>("1-2-5");
  const [from, setFrom] = useState("");
  const [to, setTo] = useState("");
  const [refusal, setRefusal] = useState<{ at: "from" | "to"; message: string } | null>(null);

  const generate = () => {
    const outcome = generateSeries(series, from, to);
    setRefusal(outcome.ok ? null : outcome);
    if (outcome.ok) onGenerate(outcome.values);
  };

  return (
    <details>
      <summary className="w-fit text-small text-water underline underline-offset-3 max-sm:py-2">
        Write a series instead
      </summary>
      <div className="mt-2 grid grid-cols-3 items-start gap-2">
        <Field label="Series">
          <Select value={series} onChange={(event) => setSeries(event.target.value as SeriesName)}>
            {seriesNames.map((name) => (
              <option key={name}>{name}</option>
            ))}
          </Select>
        </Field>
        <Field label="From" error={refusal?.at === "from" ? refusal.message : null}>
          <TextInput mono value={from} placeholder="100 kΩ" onChange={(event) => setFrom(event.target.value)} />
        </Field>
        <Field label="To" error={refusal?.at === "to" ? refusal.message : null}>
          <TextInput mono value={to} placeholder="10 GΩ" onChange={(event) => setTo(event.target.value)} />
        </Field>
        <Button size="small" onClick={generate} className="col-span-3 w-max max-sm:h-12">
          Replace the resistances by it
        </Button>
      </div>
    </details>
  );
}
