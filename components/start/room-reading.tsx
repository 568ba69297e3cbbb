import type { Room } from "@/lib/schemas/bench";
import { THIN_SPACE } from "@/lib/units/format";
import { Labelled } from "./labelled";

/** The room as its sensor reads it. */
export function RoomReading({ room }: { room: Room | null }) {
  return (
    <Labelled label="Room">
      <output
        aria-label="Room"
        className="flex h-8 items-center gap-4 rounded border border-line bg-sunken px-2.5 font-mono text-[0.90625rem] tabular max-sm:h-12"
      >
        {room ? (
          <>
            <span>{`${room.celsius.toFixed(1)}${THIN_SPACE}°C`}</span>
            {room.humidityPercent !== null && <span>{`${room.humidityPercent.toFixed(0)}${THIN_SPACE}%`}</span>}
            <span className="ml-auto font-text text-small text-ink-2">sensor</span>
          </>
        ) : (
          <span className="font-text text-ink-2">not read yet</span>
        )}
      </output>
    </Labelled>
  );
}
