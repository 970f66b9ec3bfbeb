"use client";

import {
  columnFilteringFeature,
  createFilteredRowModel,
  createSortedRowModel,
  filterFn_includesString,
  globalFilteringFeature,
  rowSortingFeature,
  tableFeatures,
  useTable,
  type ColumnDef,
} from "@tanstack/react-table";
import { useMemo, type KeyboardEvent, type ReactNode } from "react";
import { Field } from "@/components/ui/field";
import { SortIcon } from "@/components/ui/icons";
import { Input } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import { cx } from "@/components/ui/cx";

const features = tableFeatures({
  columnFilteringFeature,
  globalFilteringFeature,
  rowSortingFeature,
  filteredRowModel: createFilteredRowModel(),
  sortedRowModel: createSortedRowModel(),
  filterFns: { includesString: filterFn_includesString },
});

/** One column. Keep the array at module scope or in a memo: a new one each time sorts again. */
export type DataColumn<Row> = {
  id: string;
  header: string;
  /** What it is sorted and filtered by; a number sorts as a number. */
  value: (row: Row) => string | number;
  /** What is shown, where that is more than the value. */
  cell?: (row: Row) => ReactNode;
  sortable?: boolean;
  /** Figures stand at the right. */
  align?: "start" | "end";
};

export type DataTableProps<Row> = {
  /** Says what the table holds. */
  caption: string;
  data: readonly Row[];
  columns: readonly DataColumn<Row>[];
  rowId: (row: Row) => string;
  /** Labels the box that filters by text; without it there is none. */
  filterLabel?: string;
  /** Column to begin sorted by. */
  sortedBy?: { id: string; desc?: boolean };
  /** Shown instead of the table when there is no row at all. */
  empty?: ReactNode;
};

/** Arrow keys, Home and End move between rows; Enter opens the row's first link or button. */
function onRowKey(event: KeyboardEvent<HTMLTableRowElement>) {
  const row = event.currentTarget;
  if (event.target !== row) return;
  const all = [...(row.parentElement?.children ?? [])].filter(
    (child) => child instanceof HTMLElement,
  );
  const index = all.indexOf(row);
  const next = {
    ArrowDown: all[index + 1],
    ArrowUp: all[index - 1],
    Home: all[0],
    End: all.at(-1),
  }[event.key];
  if (next) {
    event.preventDefault();
    row.tabIndex = -1;
    next.tabIndex = 0;
    next.focus();
  } else if (event.key === "Enter") {
    row.querySelector<HTMLElement>("a, button")?.click();
  }
}

/**
 * A list one can sort, filter and walk through by keyboard. On phones each row becomes a small
 * stack of named values; the roles keep it a table for screen readers there.
 */
export function DataTable<Row extends object>({
  caption,
  data,
  columns,
  rowId,
  filterLabel,
  sortedBy,
  empty,
}: DataTableProps<Row>) {
  const defs = useMemo(
    () =>
      columns.map((column): ColumnDef<typeof features, Row> => ({
        id: column.id,
        header: column.header,
        accessorFn: column.value,
        enableSorting: column.sortable ?? true,
        sortFn: (a, b) => {
          const [left, right] = [column.value(a.original), column.value(b.original)];
          return typeof left === "number" && typeof right === "number"
            ? left - right
            : String(left).localeCompare(String(right), "en", { numeric: true });
        },
      })),
    [columns],
  );
  const table = useTable({
    features,
    columns: defs,
    data: data,
    getRowId: rowId,
    globalFilterFn: "includesString",
    getColumnCanGlobalFilter: () => true,
    initialState: {
      sorting: sortedBy ? [{ id: sortedBy.id, desc: sortedBy.desc ?? false }] : [],
      globalFilter: "",
    },
  });
  if (data.length === 0 && empty !== undefined) return <>{empty}</>;

  const rows = table.getRowModel().rows;
  const headers = table.getHeaderGroups()[0]?.headers ?? [];
  const filter = typeof table.state.globalFilter === "string" ? table.state.globalFilter : "";
  const sorting = table.state.sorting[0];
  const byId = new Map(columns.map((column) => [column.id, column]));

  return (
    <div className="min-w-0">
      <div className="mb-3 flex flex-wrap items-end gap-3 print:hidden">
        {filterLabel !== undefined && (
          <Field label={filterLabel} className="w-full max-w-xs">
            <Input
              type="search"
              value={filter}
              onChange={(event) => {
                table.setGlobalFilter(event.currentTarget.value);
              }}
            />
          </Field>
        )}
        <Field label="Sort by" className="w-full max-w-xs md:hidden">
          <Select
            value={sorting ? `${sorting.id} ${sorting.desc ? "desc" : "asc"}` : ""}
            onChange={(event) => {
              const [id, direction] = event.currentTarget.value.split(" ");
              table.setSorting(id ? [{ id, desc: direction === "desc" }] : []);
            }}
          >
            <option value="">As it comes</option>
            {columns
              .filter((column) => column.sortable ?? true)
              .flatMap((column) => [
                <option key={`${column.id} asc`} value={`${column.id} asc`}>
                  {column.header}, rising
                </option>,
                <option key={`${column.id} desc`} value={`${column.id} desc`}>
                  {column.header}, falling
                </option>,
              ])}
          </Select>
        </Field>
        <p role="status" className="pb-2 text-sm text-ink-2">
          {filter === ""
            ? `${String(data.length)} in all`
            : `${String(rows.length)} of ${String(data.length)}`}
        </p>
      </div>
      <div className="overflow-x-auto border-y-2 border-ink bg-sheet">
        <table role="table" className="w-full border-collapse text-left text-sm max-md:block">
          <caption className="sr-only">
            {caption}. Arrow keys move between rows, Enter opens one.
          </caption>
          <thead role="rowgroup" className="max-md:sr-only">
            <tr role="row">
              {headers.map((header) => {
                const column = byId.get(header.column.id);
                const sorted = header.column.getIsSorted();
                return (
                  <th
                    key={header.id}
                    role="columnheader"
                    scope="col"
                    {...(header.column.getCanSort() && {
                      "aria-sort":
                        sorted === "asc"
                          ? ("ascending" as const)
                          : sorted === "desc"
                            ? ("descending" as const)
                            : ("none" as const),
                    })}
                    className={cx(
                      "border-b border-rule px-1 py-1 align-bottom",
                      column?.align === "end" && "text-right",
                    )}
                  >
                    {header.column.getCanSort() ? (
                      <button
                        type="button"
                        onClick={() => {
                          header.column.toggleSorting(sorted === "asc");
                        }}
                        className="inline-flex min-h-9 items-center gap-1 rounded-sm px-2 font-bold hover:bg-bone"
                      >
                        {column?.header}
                        <SortIcon direction={sorted} />
                      </button>
                    ) : (
                      <span className="inline-flex min-h-9 items-center px-2 font-bold">
                        {column?.header}
                      </span>
                    )}
                  </th>
                );
              })}
            </tr>
          </thead>
          <tbody role="rowgroup" className="max-md:block">
            {rows.map((row, index) => (
              <tr
                key={row.id}
                role="row"
                tabIndex={index === 0 ? 0 : -1}
                onKeyDown={onRowKey}
                className="border-b border-rule -outline-offset-2 last:border-b-0 hover:bg-paper max-md:block max-md:px-1 max-md:py-2"
              >
                {columns.map((column, place) => (
                  <td
                    key={column.id}
                    role="cell"
                    className={cx(
                      "px-3 py-2.5 align-top max-md:flex max-md:justify-between max-md:gap-4 max-md:px-2 max-md:py-1",
                      place === 0 && "font-bold",
                      column.align === "end" && "md:text-right",
                    )}
                  >
                    {place > 0 && (
                      <span aria-hidden="true" className="font-normal text-ink-2 md:hidden">
                        {column.header}
                      </span>
                    )}
                    <span className={cx("min-w-0", place > 0 && "max-md:text-right")}>
                      {column.cell ? column.cell(row.original) : column.value(row.original)}
                    </span>
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
        {rows.length === 0 && (
          <p className="px-3 py-6 text-ink-2">Nothing matches “{filter}”. Try fewer letters.</p>
        )}
      </div>
    </div>
  );
}
