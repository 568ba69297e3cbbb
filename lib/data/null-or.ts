/** What `map` makes of a row; null when there is none. */
export function nullOr<R, T>(row: R | null, map: (row: R) => T): T | null {
  return row === null ? null : map(row);
}
