import { HatchStrip } from "@/components/shell/hatch-strip";
import type { OutputState } from "@/lib/schemas/bench";
import { formatTerminalVolts } from "@/lib/units/format";

/** The strip under the bar. It keeps its height while the output is off, so that nothing moves from point to point. */
export function OutputLine({ output, benchName }: { output: OutputState; benchName: string }) {
  if (output.state !== "off") return <HatchStrip output={output} benchName={benchName} />;
  return (
    <p className="flex min-h-7.5 items-center bg-sunken px-6 text-label text-ink-2 max-sm:px-4">
      {`Output off, terminals of ${benchName} ${output.volts === null ? "proven discharged" : `at ${formatTerminalVolts(output.volts)}`}`}
    </p>
  );
}
