import { Segmented } from "@/components/ui/segmented";
import { Labelled } from "./labelled";

const SPEEDS = [1, 10, 60, 500];
export const USUAL_SPEED = 60;

interface SimulatedTimeProps {
  speed: number;
  onChoose: (speed: number) => void;
}

/** How fast the time of a simulated bench runs. */
export function SimulatedTime({ speed, onChoose }: SimulatedTimeProps) {
  return (
    <Labelled
      label="Simulated time"
      hint="This bench is a simulation: no instrument is connected, and its time may run faster than the clock on the wall."
    >
      <Segmented
        label="Simulated time"
        segments={SPEEDS.map((value) => ({ value: String(value), label: `${value}×` }))}
        value={String(speed)}
        onChange={(value) => onChoose(Number(value))}
      />
    </Labelled>
  );
}
