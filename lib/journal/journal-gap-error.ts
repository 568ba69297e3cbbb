/** A record is missing between the last one folded and the one at hand; ask again from `lastSeq`. */
export class JournalGapError extends Error {
  override readonly name = "JournalGapError";
  constructor(
    readonly lastSeq: number,
    readonly nextSeq: number,
  ) {
    super(`The journal goes from record ${lastSeq} to ${nextSeq}: ${nextSeq - lastSeq - 1} records are missing.`);
  }
}

/** By name, because a second copy of the class exists in the web bundle. */
export function isJournalGapError(error: unknown): error is JournalGapError {
  return error instanceof Error && error.name === "JournalGapError";
}
