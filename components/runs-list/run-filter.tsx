"use client";

import { debounce, parseAsInteger, parseAsString, parseAsStringLiteral, useQueryStates } from "nuqs";
import { useTransition } from "react";
import { Select, TextInput } from "@/components/ui/controls";
import { Field } from "@/components/ui/field";
import { runQuerySchema } from "@/lib/schemas/run";

const statuses = runQuerySchema.shape.status.unwrap().options;
const shares = runQuerySchema.shape.outside.unwrap().options;

const statusChoices: Readonly<Record<(typeof statuses)[number], string>> = {
  all: "any status",
  active: "under way",
  finished: "finished",
  stopped: "stopped",
};

const shareChoices: Readonly<Record<(typeof shares)[number], string>> = {
  all: "inside or outside",
  some: "some points outside",
  none: "no point outside",
};

const filterParsers = {
  search: parseAsString.withDefault(""),
  bench: parseAsString.withDefault(""),
  status: parseAsStringLiteral(statuses).withDefault("all"),
  outside: parseAsStringLiteral(shares).withDefault("all"),
  page: parseAsInteger.withDefault(1),
};

/** Narrows the list of runs; what is asked lives in the URL. */
export function RunFilter({ benches }: { benches: readonly { id: string; name: string }[] }) {
  const [isPending, startTransition] = useTransition();
  const [filter, setFilter] = useQueryStates(filterParsers, { shallow: false, startTransition });
  return (
    <search aria-busy={isPending} className="grid grid-cols-2 items-end gap-3 sm:flex sm:flex-wrap">
      <Field label="Search" className="col-span-2 min-w-56 flex-1">
        <TextInput
          type="search"
          value={filter.search}
          maxLength={80}
          placeholder="Unit, recipe, person or run number"
          onChange={(event) =>
            void setFilter({ search: event.target.value, page: null }, { limitUrlUpdates: debounce(250) })
          }
        />
      </Field>
      <Choice
        label="Bench"
        value={filter.bench}
        choices={[["", "any bench"], ...benches.map(({ id, name }): [string, string] => [id, name])]}
        onChoose={(bench) => void setFilter({ bench, page: null })}
      />
      <Choice
        label="Status"
        value={filter.status}
        choices={statuses.map((value) => [value, statusChoices[value]])}
        onChoose={(status) => void setFilter({ status, page: null })}
      />
      <Choice
        label="Points"
        value={filter.outside}
        choices={shares.map((value) => [value, shareChoices[value]])}
        onChoose={(outside) => void setFilter({ outside, page: null })}
      />
      <span role="status" className="sr-only">
        {isPending ? "Looking for runs" : ""}
      </span>
    </search>
  );
}

interface ChoiceProps<T extends string> {
  label: string;
  value: T;
  choices: readonly (readonly [value: T, words: string])[];
  onChoose: (value: T) => void;
}

function Choice<T extends string>({ label, value, choices, onChoose }: ChoiceProps<T>) {
  return (
    <Field label={label}>
      <Select value={value} onChange={(event) => onChoose(event.target.value as T)}>
        {choices.map(([choice, words]) => (
          <option key={choice} value={choice}>
            {words}
          </option>
        ))}
      </Select>
    </Field>
  );
}
