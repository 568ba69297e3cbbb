import type { Room } from "@/lib/schemas/bench";

/** A room that has changed by more than this since the start is pointed out before a run goes on. */
const NOTABLE_KELVIN = 2;

/** `The room is 3.7 °C colder than at the start (22.8 °C, now 19.1 °C).`; null when it is much as it was, or unknown. */
export function roomChange(atStart: Room | undefined, now: Room | null | undefined): string | null {
  if (!atStart || !now) return null;
  const change = now.celsius - atStart.celsius;
  if (Math.abs(change) <= NOTABLE_KELVIN) return null;
  const direction = change > 0 ? "warmer" : "colder";
  return `The room is ${celsius(Math.abs(change))} ${direction} than at the start (${celsius(atStart.celsius)}, now ${celsius(now.celsius)}).`;
}

function celsius(value: number): string {
  return `${value.toFixed(1).replace("-", "\u2212")}\u2009°C`;
}
