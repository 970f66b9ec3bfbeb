import { useState, type KeyboardEvent } from "react";

type Place = { row: number; column: number };

export type GridKeys = {
  /** Stands on the table. */
  onKeyDown: (event: KeyboardEvent<HTMLTableElement>) => void;
  /** For the element of each cell that takes the focus. Row -1 is the heading. */
  cell: (
    row: number,
    column: number,
  ) => {
    tabIndex: 0 | -1;
    "data-cell": string;
    onFocus: () => void;
  };
};

const STEPS: Record<string, Place> = {
  ArrowUp: { row: -1, column: 0 },
  ArrowDown: { row: 1, column: 0 },
  ArrowLeft: { row: 0, column: -1 },
  ArrowRight: { row: 0, column: 1 },
};

const clamp = (value: number, low: number, high: number) =>
  Math.max(low, Math.min(value, Math.max(low, high)));

/**
 * One tab stop for a whole table: arrow keys move from cell to cell, Home and End to the ends of a
 * row, with Control to the ends of the table. Cells that hold nothing are stepped over.
 */
export function useGridKeys(size: { rows: number; columns: number; heading?: boolean }): GridKeys {
  const [at, setAt] = useState<Place>({ row: 0, column: 0 });
  const top = size.heading ? -1 : 0;
  const here = {
    row: clamp(at.row, top, size.rows - 1),
    column: clamp(at.column, 0, size.columns - 1),
  };

  /** The nearest cell from a place on, going by a step; null at the edge. */
  function find(table: HTMLElement, from: Place, step: Place): HTMLElement | null {
    for (
      let { row, column } = from;
      row >= top && row < size.rows && column >= 0 && column < size.columns;
      row += step.row, column += step.column
    ) {
      const found = table.querySelector<HTMLElement>(
        `[data-cell="${String(row)} ${String(column)}"]`,
      );
      if (found) return found;
    }
    return null;
  }

  function target(event: KeyboardEvent<HTMLTableElement>): HTMLElement | null {
    const step = STEPS[event.key];
    if (step)
      return find(
        event.currentTarget,
        { row: here.row + step.row, column: here.column + step.column },
        step,
      );
    const whole = event.ctrlKey || event.metaKey;
    if (event.key === "Home") {
      return find(
        event.currentTarget,
        { row: whole ? 0 : here.row, column: 0 },
        { row: 0, column: 1 },
      );
    }
    if (event.key === "End") {
      const row = whole ? size.rows - 1 : here.row;
      return find(event.currentTarget, { row, column: size.columns - 1 }, { row: 0, column: -1 });
    }
    return null;
  }

  return {
    onKeyDown: (event) => {
      if (!(event.target instanceof HTMLElement) || event.target.dataset["cell"] === undefined) {
        return;
      }
      const next = target(event);
      if (!next) return;
      event.preventDefault();
      next.focus();
    },
    cell: (row, column) => ({
      tabIndex: row === here.row && column === here.column ? 0 : -1,
      "data-cell": `${String(row)} ${String(column)}`,
      onFocus: () => {
        setAt({ row, column });
      },
    }),
  };
}
