"use client";

import { useState } from "react";
import { engineeringParts, THIN_SPACE } from "@/lib/units/format";
import { classNames } from "@/components/ui/class-names";

export interface DialsProps {
  /** Steps of the decades from the heaviest to the lightest, in ohms. */
  stepOhms: readonly number[];
  /** Positions as read back; null while nothing has been read back. */
  positions: readonly number[] | null;
}

/** A row of digit windows with their weights, as they stand on the box. */
export function Dials({ stepOhms, positions }: DialsProps) {
  return (
    <ol aria-label={describeDials(stepOhms, positions)} className="flex gap-1">
      {stepOhms.map((step, index) => (
        <li key={index} aria-hidden="true" className="max-w-10.5 min-w-0 flex-1 text-center">
          <Digit position={positions?.[index] ?? null} />
          <span className="block text-[clamp(0.5625rem,2.3vw,0.71875rem)] leading-4.5 whitespace-nowrap text-ink-2 [font-family:var(--mono-family)]">
            {weightOf(step)}
          </span>
        </li>
      ))}
    </ol>
  );
}

/** A digit that changes slides into its window once. */
function Digit({ position }: { position: number | null }) {
  const [shown, setShown] = useState({ position, turns: 0 });
  if (shown.position !== position) setShown({ position, turns: shown.turns + 1 });
  const isSet = position !== null && position > 0;
  return (
    <span
      className={classNames(
        "block h-10.5 overflow-hidden rounded font-mono text-[1.5625rem] leading-10.5 font-semibold max-sm:text-[1.25rem]",
        isSet ? "bg-dial text-dial-ink" : "bg-sunken text-ink-3",
      )}
    >
      <span key={shown.turns} className={classNames("block", shown.turns > 0 && "dial-turn")}>
        {position ?? "–"}
      </span>
    </span>
  );
}

function weightOf(stepOhms: number): string {
  const { number, unit } = engineeringParts(stepOhms, "", { digits: 1 });
  return `${number}${THIN_SPACE}${unit || "Ω"}`;
}

function describeDials(stepOhms: readonly number[], positions: readonly number[] | null): string {
  if (!positions) return "Dials, not read back yet";
  const set = stepOhms.map((step, index) => `${positions[index] ?? 0} at ${weightOf(step)}`);
  return `Dials as read back: ${set.join(", ")}`;
}
