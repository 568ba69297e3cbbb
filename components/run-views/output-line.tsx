import { HatchStrip } from "@/components/shell/hatch-strip";
import type { OutputState } from "@/lib/schemas/bench";
import { formatTerminalVolts } from "@/lib/units/format";

/**
 * The strip under the bar; on a phone a narrow edge, whose words stand in the phone's head. It keeps its height while
 * the output is off, so that nothing moves from point to point.
 */
export function OutputLine({ output, benchName }: { output: OutputState; benchName: string }) {
  return (
    <section aria-label="Output">
      <div className="min-h-2.5 bg-sunken sm:hidden">
        <HatchStrip output={output} benchName={benchName} size="edge" />
      </div>
      <div className="min-h-7.5 bg-sunken max-sm:hidden">
        {output.state === "off" ? (
          <p className="flex min-h-7.5 items-center px-6 text-label text-ink-2">{offWords(output, benchName)}</p>
        ) : (
          <HatchStrip output={output} benchName={benchName} />
        )}
      </div>
    </section>
  );
}

function offWords({ volts }: OutputState, benchName: string): string {
  return volts === null
    ? `Output off, terminals of ${benchName} discharged`
    : `Output off, terminals of ${benchName} at ${formatTerminalVolts(volts)}`;
}
