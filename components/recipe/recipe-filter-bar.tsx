"use client";

import { debounce, parseAsString, parseAsStringLiteral, useQueryStates } from "nuqs";
import { Select, TextInput } from "@/components/ui/controls";
import { Field } from "@/components/ui/field";
import { recipeStateSchema } from "@/lib/schemas/recipe";
import { stateWords } from "./recipe-words";

const filterParsers = {
  search: parseAsString.withDefault(""),
  state: parseAsStringLiteral(recipeStateSchema.options),
  model: parseAsString.withDefault(""),
};

interface RecipeFilterBarProps {
  models: readonly { id: string; name: string }[];
}

/** Narrows the list of recipes; what is asked lives in the URL. */
export function RecipeFilterBar({ models }: RecipeFilterBarProps) {
  const [filter, setFilter] = useQueryStates(filterParsers, { shallow: false });
  return (
    <search className="grid grid-cols-2 items-end gap-3 sm:flex sm:flex-wrap">
      <Field label="Search" className="min-w-56 flex-1 max-sm:col-span-2">
        <TextInput
          type="search"
          value={filter.search}
          maxLength={80}
          placeholder="Name or purpose"
          onChange={(event) => void setFilter({ search: event.target.value }, { limitUrlUpdates: debounce(250) })}
        />
      </Field>
      <Field label="State">
        <Select
          value={filter.state ?? ""}
          onChange={(event) => {
            const state = recipeStateSchema.options.find((known) => known === event.target.value);
            void setFilter({ state: state ?? null });
          }}
        >
          <option value="">any state</option>
          {recipeStateSchema.options.map((state) => (
            <option key={state} value={state}>
              {stateWords[state].toLowerCase()}
            </option>
          ))}
        </Select>
      </Field>
      <Field label="Model">
        <Select value={filter.model} onChange={(event) => void setFilter({ model: event.target.value })}>
          <option value="">any model</option>
          {models.map(({ id, name }) => (
            <option key={id} value={id}>
              {name}
            </option>
          ))}
        </Select>
      </Field>
    </search>
  );
}
