import { formatDay } from "@/components/runs-list/format-day";
import { ClockTime } from "@/components/ui/clock-time";
import type { RunState } from "@/lib/journal/run-state";
import { conditionWords } from "./run-links";

/** `as found, 30 Nov 2026, 13:59 to 14:41`. */
export function RunWhen({ state }: { state: RunState }) {
  const { setup, startedAtMs, endedAtMs } = state;
  if (!setup || startedAtMs === null) return null;
  const endsLater = endedAtMs !== null && formatDay(endedAtMs) !== formatDay(startedAtMs);
  return (
    <>
      {conditionWords(setup.condition)}, {formatDay(startedAtMs)}, <ClockTime atMs={startedAtMs} />
      {endedAtMs !== null && (
        <>
          {" to "}
          {endsLater && `${formatDay(endedAtMs)}, `}
          <ClockTime atMs={endedAtMs} />
        </>
      )}
    </>
  );
}
