export interface GridPlace {
  row: number;
  column: number;
}

/** Where the focus goes in a grid when a key is pressed; null for a key that does not move it. */
export function placeAfter(key: string, { row, column }: GridPlace, rows: number, columns: number): GridPlace | null {
  const to = (nextRow: number, nextColumn: number): GridPlace => ({
    row: Math.min(rows - 1, Math.max(0, nextRow)),
    column: Math.min(columns - 1, Math.max(0, nextColumn)),
  });
  switch (key) {
    case "ArrowUp":
      return to(row - 1, column);
    case "ArrowDown":
      return to(row + 1, column);
    case "ArrowLeft":
      return to(row, column - 1);
    case "ArrowRight":
      return to(row, column + 1);
    case "Home":
      return to(row, 0);
    case "End":
      return to(row, columns - 1);
    case "PageUp":
      return to(0, column);
    case "PageDown":
      return to(rows - 1, column);
    default:
      return null;
  }
}
