import type { MatrixTable } from "./matrix-cells";

export interface MatrixPlace {
  row: number;
  column: number;
}

const STEPS: Readonly<Record<string, readonly [rows: number, columns: number]>> = {
  ArrowUp: [-1, 0],
  ArrowDown: [1, 0],
  ArrowLeft: [0, -1],
  ArrowRight: [0, 1],
};

/** The next planned cell in the direction of an arrow key; null at the edge and for other keys. */
export function placeAfterArrow(key: string, from: MatrixPlace, table: MatrixTable): MatrixPlace | null {
  const step = STEPS[key];
  if (!step) return null;
  let place = { row: from.row + step[0], column: from.column + step[1] };
  for (;;) {
    const cell = table.rows[place.row]?.cells[place.column];
    if (!cell) return null;
    if ("point" in cell) return place;
    place = { row: place.row + step[0], column: place.column + step[1] };
  }
}
