import Link from "next/link";
import type { ReactNode } from "react";
import { classNames } from "./class-names";

export type SortDirection = "rising" | "falling";

export interface Sort<C extends string = string> {
  column: C;
  direction: SortDirection;
}

export interface Column<C extends string = string> {
  id: C;
  label: ReactNode;
  align?: "left" | "right";
  sortable?: boolean;
  /** Label for assistive technology only, for a column whose marks speak for themselves. */
  labelHidden?: boolean;
  className?: string;
}

export interface DataTableProps {
  /** Names the table; shown only to assistive technology unless `captionShown`. */
  caption: string;
  captionShown?: boolean;
  dense?: boolean;
  className?: string;
  /** TableHead and a tbody of plain tr and td; right-aligned figures take the class `figure`. */
  children: ReactNode;
}

/** Rows of 32 px (26 px when dense); scrolls sideways inside its panel where the screen is narrow. A scroller would hold the head, so there is none where it is wide. */
export function DataTable({ caption, captionShown = false, dense = false, className, children }: DataTableProps) {
  return (
    <div className="print:overflow-visible max-xl:overflow-x-auto">
      <table
        className={classNames(
          "w-full border-separate border-spacing-0 text-[0.875rem] [&_td]:border-b [&_td]:border-line [&_td]:px-2.5 [&_tbody_th]:border-b [&_tbody_th]:border-line [&_tbody_th]:px-2.5",
          dense ? "[&_td]:h-6.5 [&_tbody_th]:h-6.5" : "[&_td]:h-8 [&_tbody_th]:h-8",
          className,
        )}
      >
        <caption className={captionShown ? "px-2.5 py-2 text-left text-label text-ink-2" : "sr-only"}>
          {caption}
        </caption>
        {children}
      </table>
    </div>
  );
}

export interface TableHeadProps<C extends string> {
  columns: readonly Column<C>[];
  sort?: Sort<C> | null;
  /** Sorting by address: the link that a press on the head follows. */
  hrefFor?: (sort: Sort<C>) => string;
  /** Sorting in place. */
  onSort?: (sort: Sort<C>) => void;
}

/** The head stays in view while the rows scroll; a press on a sortable column sorts, a second press turns the order. */
export function TableHead<C extends string>({ columns, sort, hrefFor, onSort }: TableHeadProps<C>) {
  return (
    <thead>
      <tr>
        {columns.map((column) => (
          <th
            key={column.id}
            scope="col"
            aria-sort={ariaSort(column, sort)}
            className={classNames(
              "sticky top-0 z-10 border-b border-line-strong bg-panel px-2.5 py-2 align-bottom text-label font-semibold whitespace-nowrap text-ink-2",
              column.align === "right" ? "text-right" : "text-left",
              column.className,
            )}
          >
            <HeadLabel column={column} sort={sort} hrefFor={hrefFor} onSort={onSort} />
          </th>
        ))}
      </tr>
    </thead>
  );
}

function ariaSort<C extends string>(column: Column<C>, sort: Sort<C> | null | undefined) {
  if (!column.sortable) return undefined;
  if (sort?.column !== column.id) return "none";
  return sort.direction === "rising" ? "ascending" : "descending";
}

function HeadLabel<C extends string>({
  column,
  sort,
  hrefFor,
  onSort,
}: Omit<TableHeadProps<C>, "columns"> & { column: Column<C> }) {
  if (column.labelHidden) return <span className="sr-only">{column.label}</span>;
  if (!column.sortable) return column.label;
  const isSorted = sort?.column === column.id;
  const next: Sort<C> = {
    column: column.id,
    direction: isSorted && sort.direction === "rising" ? "falling" : "rising",
  };
  const looks = classNames(
    "inline-flex items-baseline gap-1 no-underline hover:text-ink hover:underline",
    isSorted ? "text-ink" : "text-ink-2",
  );
  const mark = <SortMark direction={isSorted ? sort.direction : null} />;
  // Before a right-aligned label, so that the label ends where its figures end.
  const content =
    column.align === "right" ? (
      <>
        {mark}
        {column.label}
      </>
    ) : (
      <>
        {column.label}
        {mark}
      </>
    );
  return hrefFor ? (
    <Link href={hrefFor(next)} scroll={false} className={looks}>
      {content}
    </Link>
  ) : (
    <button type="button" onClick={() => onSort?.(next)} className={classNames(looks, "font-semibold")}>
      {content}
    </button>
  );
}

function SortMark({ direction }: { direction: SortDirection | null }) {
  return (
    <svg aria-hidden="true" viewBox="0 0 8 8" className="size-2 flex-none">
      {direction && <path d={direction === "rising" ? "M0 7h8L4 0z" : "M0 1h8L4 8z"} fill="currentColor" />}
    </svg>
  );
}
