import { Checkbox } from "@/components/ui/checkbox";
import { Panel } from "@/components/ui/panel";
import type { Plan } from "@/lib/schemas/plan";
import { formatTestVolts } from "@/lib/units/format";

interface CautionsProps {
  /** Null until unit and recipe are chosen: the lines depend on the voltage. */
  plan: Plan | null;
  cautions: readonly string[];
  ticked: ReadonlySet<string>;
  onTick: (caution: string, isTicked: boolean) => void;
}

/** What a person confirms with their own eyes and hands before a voltage may be switched on. */
export function Cautions({ plan, cautions, ticked, onTick }: CautionsProps) {
  const highestVolts = Math.max(0, ...(plan?.points ?? []).map((point) => point.highestVolts));
  return (
    <Panel title="Before the output is switched on">
      <div className="grid gap-2">
        {cautions.map((caution) => (
          <Checkbox
            key={caution}
            checked={ticked.has(caution)}
            onChange={(event) => onTick(caution, event.target.checked)}
          >
            {caution}
          </Checkbox>
        ))}
        {cautions.length === 0 && (
          <p className="text-ink-2">The lines to confirm stand here once the unit and the recipe are chosen.</p>
        )}
        <p className="text-label text-ink-2">
          {highestVolts > 0 && `Up to ${formatTestVolts(Math.ceil(highestVolts))} will be present at the terminals. `}
          Stepwell is not a safety device and replaces no interlock: local rules and the makers’ manuals come first.
        </p>
      </div>
    </Panel>
  );
}
