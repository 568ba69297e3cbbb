import { Segmented } from "@/components/ui/segmented";
import { runPath, type RunPage } from "./run-links";

/** The pages of one run: what came out, how it went, and every record. */
export function RunPages({ runId, here }: { runId: string; here: RunPage | null }) {
  return (
    <Segmented
      label="Pages of this run"
      value={here ?? ("" as RunPage)}
      segments={[
        { value: "results", label: "Results", href: runPath(runId, "results") },
        { value: "replay", label: "Replay", href: runPath(runId, "replay") },
        { value: "journal", label: "Journal", href: runPath(runId, "journal") },
      ]}
    />
  );
}
