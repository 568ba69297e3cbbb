"use client";

import { Combobox } from "@base-ui/react/combobox";
import type { ReactNode } from "react";

export interface ChoiceGroup<T> {
  /** Heading of the group; an empty one shows none. */
  title: string;
  items: readonly T[];
}

export interface SearchChoiceProps<T> {
  id: string;
  /** The label's words; the label itself is out of reach of assistive technology while the list is open. */
  name: string;
  /** Id of the sentence under the field. */
  describedBy: string;
  placeholder: string;
  groups: readonly ChoiceGroup<T>[];
  value: T | null;
  onChoose: (item: T | null) => void;
  idOf: (item: T) => string;
  label: (item: T) => string;
  /** A second line of an entry. */
  detail: (item: T) => ReactNode;
  /** What an entry is found by among those at hand; left out where `onSearch` asks elsewhere. */
  searchText?: (item: T) => string;
  onSearch?: (text: string) => void;
  /** Said instead of the list: that it is being fetched, why it could not be, or that nothing fits. */
  notice: string;
}

interface ItemGroup<T> {
  value: string;
  items: T[];
}

/** A field that is filled by typing part of an entry and choosing it, by keyboard, touch or pointer. */
export function SearchChoice<T extends object>(props: SearchChoiceProps<T>) {
  const { groups, value, onChoose, idOf, label, searchText, onSearch } = props;
  const items: ItemGroup<T>[] = groups.map((group) => ({ value: group.title, items: [...group.items] }));
  return (
    <Combobox.Root<T>
      items={items}
      value={value}
      onValueChange={(item) => onChoose(item)}
      itemToStringLabel={label}
      isItemEqualToValue={(item, chosen) => idOf(item) === idOf(chosen)}
      filter={searchText ? (item, query) => holdsEveryWord(searchText(item), query) : null}
      onInputValueChange={(text, { reason }) => onSearch?.(reason === "input-change" ? text : "")}
      autoHighlight
    >
      <Combobox.InputGroup className="relative flex h-9 items-center rounded border border-line-strong bg-panel has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-water max-sm:h-12">
        <Combobox.Input
          id={props.id}
          aria-label={props.name}
          aria-describedby={props.describedBy}
          placeholder={props.placeholder}
          className="h-full w-full min-w-0 bg-transparent px-2.5 text-text outline-none placeholder:text-ink-2"
        />
        {value && (
          <Combobox.Clear aria-label="Clear" className="px-2 text-small text-ink-2 max-sm:px-3">
            <span aria-hidden="true">×</span>
          </Combobox.Clear>
        )}
      </Combobox.InputGroup>
      <Combobox.Portal>
        <Combobox.Positioner sideOffset={3} className="z-20">
          <Combobox.Popup className="w-(--anchor-width) rounded border border-line-strong bg-panel">
            <Combobox.Empty>
              <p className="px-2.5 py-2 text-small text-ink-2 empty:hidden">{props.notice}</p>
            </Combobox.Empty>
            <Combobox.List className="max-h-[min(24rem,var(--available-height))] scroll-py-1 overflow-y-auto overscroll-contain">
              {(group: ItemGroup<T>) => <ChoiceList key={group.value} group={group} {...props} />}
            </Combobox.List>
          </Combobox.Popup>
        </Combobox.Positioner>
      </Combobox.Portal>
    </Combobox.Root>
  );
}

function ChoiceList<T extends object>({ group, idOf, label, detail }: SearchChoiceProps<T> & { group: ItemGroup<T> }) {
  return (
    <Combobox.Group items={group.items}>
      {group.value && (
        <Combobox.GroupLabel className="px-2.5 pt-2 pb-1 text-label text-ink-2">{group.value}</Combobox.GroupLabel>
      )}
      <Combobox.Collection>
        {(item: T) => (
          <Combobox.Item
            key={idOf(item)}
            value={item}
            className="block cursor-default border-l-3 border-transparent px-2 py-1.5 data-highlighted:border-water data-highlighted:bg-water-tint max-sm:py-2.5"
          >
            {label(item)}
            <span className="block text-label text-ink-2">{detail(item)}</span>
          </Combobox.Item>
        )}
      </Combobox.Collection>
    </Combobox.Group>
  );
}

/** Whether a text holds every word of a query, in any order and case. */
export function holdsEveryWord(text: string, query: string): boolean {
  const lower = text.toLowerCase();
  return query
    .toLowerCase()
    .split(/[\s,]+/u)
    .every((word) => lower.includes(word));
}
