"use client";

import { useDeferredValue, useRef, useState, type ReactNode } from "react";
import { Select, TextArea, TextInput } from "@/components/ui/controls";
import { Field, FieldError } from "@/components/ui/field";
import { Note } from "@/components/ui/note";
import { Panel } from "@/components/ui/panel";
import type { PointOrder } from "@/lib/schemas/recipe";
import { EditorBar } from "./editor-bar";
import { ForecastPanel } from "./forecast-panel";
import { ListField } from "./list-field";
import { ModelChoice } from "./model-choice";
import { PointsPanel } from "./points-panel";
import { isSameCell, typedOhms, withCells, type RecipeForm } from "./recipe-form";
import { orderWords, understoodOhms, understoodVolts } from "./recipe-words";
import { ReleaseDialog } from "./release-dialog";
import { SeriesGenerator } from "./series-generator";
import { SettlingFields } from "./settling-fields";
import { useForecast } from "./use-forecast";
import { useRecipeEditor, type RecipeRegister } from "./use-recipe-editor";

export interface RecipeEditorProps {
  recipeId?: string;
  initial: RecipeForm;
  /** The version that storing makes or changes. */
  version: number;
  register: RecipeRegister;
  mayRelease: boolean;
  /** Where this is and what it is called. */
  heading: ReactNode;
}

/** Writes a recipe: what and for whom left, its points in the middle, settling and forecast right. */
export function RecipeEditor({ recipeId, initial, version, register, mayRelease, heading }: RecipeEditorProps) {
  const editor = useRecipeEditor({ recipeId, initial, register });
  const { form, change, parsed, problems } = editor;
  const [isReleasing, setIsReleasing] = useState(false);
  const document = useDeferredValue(parsed.document);
  const formElement = useRef<HTMLFormElement>(null);
  const choice = useForecast({ document, modelIds: form.modelIds, benches: register.benches, models: register.models });

  /** Asks for a right form, and brings the first wrong field to hand. */
  const mayStore = () => {
    const isRight = editor.ask();
    if (!isRight) setTimeout(() => formElement.current?.querySelector<HTMLElement>("[aria-invalid=true]")?.focus());
    return isRight;
  };

  return (
    <form
      ref={formElement}
      noValidate
      className="grid gap-4"
      onSubmit={(event) => {
        event.preventDefault();
        if (mayStore()) editor.save(false);
      }}
    >
      <EditorBar
        heading={heading}
        version={version}
        isDirty={editor.isDirty}
        isSaving={editor.isSaving}
        cancelHref={recipeId ? `/recipes/${recipeId}` : "/recipes"}
        onRelease={mayRelease ? () => setIsReleasing(mayStore()) : undefined}
        problemCount={Object.keys(problems).length}
      />
      {editor.failure && (
        <Note tone="bad" title="Not stored." alert>
          {editor.failure}
        </Note>
      )}
      <FieldError message={problems.form?.join(" ")} />
      <div className="grid items-start gap-4 lg:grid-cols-[280px_minmax(0,1fr)] xl:grid-cols-[280px_minmax(0,1fr)_320px]">
        <Panel title="Recipe">
          <RecipeFields editor={editor} />
        </Panel>
        <PointsPanel
          nominalOhms={parsed.resistances.values}
          testVolts={parsed.voltages.values}
          isIncluded={(cell) => !form.excluded.some((excluded) => isSameCell(excluded, cell))}
          plan={document && parsed.document ? (choice.forecast?.plan ?? null) : null}
          onChange={(cells, isIncluded) => editor.replace((known) => withCells(known, cells, isIncluded))}
        >
          <p className="px-1 text-label text-ink-2">
            Press a cell to leave it out or take it in; draw over many with the mouse. Arrow keys move, Space switches.
          </p>
          <FieldError message={problems.points?.join(" ")} />
        </PointsPanel>
        <div className="grid content-start gap-4 lg:max-xl:col-span-2 lg:max-xl:grid-cols-2">
          <Panel title="Settling">
            <SettlingFields
              settling={form.settling}
              onChange={(settling) => change({ settling })}
              problems={problems}
            />
            <div className="mt-3 grid grid-cols-2 gap-3">
              <Field label="Readings a point" error={problems.readings?.join(" ")}>
                <TextInput
                  mono
                  inputMode="numeric"
                  value={form.readings}
                  onChange={(event) => change({ readings: event.target.value })}
                />
              </Field>
              <Field label="Order" error={problems.order?.join(" ")}>
                <Select value={form.order} onChange={(event) => change({ order: event.target.value as PointOrder })}>
                  {Object.entries(orderWords).map(([order, words]) => (
                    <option key={order} value={order}>
                      {words}
                    </option>
                  ))}
                </Select>
              </Field>
            </div>
          </Panel>
          <ForecastPanel choice={choice} benches={register.benches} />
        </div>
      </div>
      <ReleaseDialog
        isOpen={isReleasing}
        onClose={() => setIsReleasing(false)}
        onRelease={() => {
          setIsReleasing(false);
          editor.save(true);
        }}
        isBusy={editor.isSaving}
        name={form.name.trim()}
        version={version}
      />
    </form>
  );
}

/** Name, purpose, resistances, voltages and models. */
function RecipeFields({ editor }: { editor: ReturnType<typeof useRecipeEditor> }) {
  const { form, change, parsed, problems } = editor;
  return (
    <div className="grid gap-4">
      <Field label="Name" error={problems.name?.join(" ")}>
        <TextInput value={form.name} onChange={(event) => change({ name: event.target.value })} />
      </Field>
      <Field label="Purpose" optional error={problems.purpose?.join(" ")}>
        <TextArea rows={2} value={form.purpose} onChange={(event) => change({ purpose: event.target.value })} />
      </Field>
      <ListField
        label="Resistances"
        value={form.resistances}
        placeholder="100 kΩ, 1 MΩ, 10 MΩ"
        rows={4}
        onChange={(resistances) => change({ resistances })}
        parsed={parsed.resistances}
        understood={understoodOhms(parsed.resistances.values)}
        problems={problems.resistances}
      />
      <SeriesGenerator onGenerate={(values) => change({ resistances: typedOhms(values) })} />
      <ListField
        label="Test voltages"
        value={form.voltages}
        placeholder="250 V, 500 V, 1 kV"
        rows={2}
        onChange={(voltages) => change({ voltages })}
        parsed={parsed.voltages}
        understood={understoodVolts(parsed.voltages.values)}
        problems={problems.voltages}
      />
      <ModelChoice
        models={editor.models}
        chosen={form.modelIds}
        onChange={(modelIds) => change({ modelIds })}
        problems={problems.models}
      />
    </div>
  );
}
