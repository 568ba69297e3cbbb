import type { Bench } from "@/lib/schemas/bench";
import type { Clock } from "@/lib/engine/clock";
import type { Unit } from "@/lib/schemas/instrument";
import type { SimulatedCircuit } from "./circuit";
import { hashNormal } from "./noise";
import { OVER_RANGE, parseBoolean, parseNumber, ScpiFault } from "./scpi-dialect";
import { ScpiDevice } from "./scpi-device";

const METER_NOISE_VOLTS = 0.05;
const METER_NOISE_SHARE = 2e-4;
const FIRMWARE = "1.0";

/** SOURce:RESistance:POSition 1,0,… sets the dials from the heaviest decade on; SOURce:RESistance? tells the nominal value. */
export function simulatedBox({ standard }: Bench, circuit: SimulatedCircuit): ScpiDevice {
  const nominal = () =>
    circuit.state.positions.reduce((sum, position, index) => sum + position * standard.decades[index]!.stepOhms, 0);
  return new ScpiDevice(
    "decade-box",
    () => `${standard.maker},${standard.model},${standard.serialNumber},${FIRMWARE}`,
    {
      "SOURce:RESistance:POSition": (argument) => {
        const positions = (argument ?? "").split(",").map((text) => parseNumber(text, "DIAL"));
        const isWhole = positions.length === standard.decades.length;
        const isInRange = positions.every(
          (position, index) =>
            Number.isInteger(position) && position >= 0 && position <= (standard.decades[index]?.highestPosition ?? 0),
        );
        if (!isWhole) throw new ScpiFault("missingParameter");
        if (!isInRange) throw new ScpiFault("dataOutOfRange");
        circuit.moveDials(positions);
        return undefined;
      },
      "SOURce:RESistance:POSition?": () => circuit.state.positions.join(","),
      "SOURce:RESistance?": () => scientific(nominal(), 10),
    },
  );
}

/** SOURce:VOLTage, OUTPut, MEASure:RESistance?, MEASure:VOLTage? of the tester that is plugged in. */
export function simulatedTester(circuit: SimulatedCircuit, unit: () => Unit | null): ScpiDevice {
  const identity = () => {
    const connected = unit();
    return connected
      ? `${connected.model.maker},${connected.model.model},${connected.serialNumber},${FIRMWARE}`
      : "none,none,0,0";
  };
  return new ScpiDevice("tester", identity, {
    "SOURce:VOLTage[:LEVel]": (argument) => {
      const wanted = parseNumber(argument, "V");
      if (!circuit.unit?.model.testVolts.some((testVolts) => testVolts === wanted))
        throw new ScpiFault("dataOutOfRange");
      if (circuit.state.isOutputOn) throw new ScpiFault("settingsConflict");
      circuit.selectVoltage(wanted);
      return undefined;
    },
    "*RST": () => {
      circuit.switchOutput(false);
      return undefined;
    },
    "SOURce:VOLTage[:LEVel]?": () => scientific(circuit.state.testVolts, 4),
    "OUTPut[:STATe]": (argument) => {
      circuit.switchOutput(parseBoolean(argument));
      return undefined;
    },
    "OUTPut[:STATe]?": () => (circuit.state.isOutputOn ? "1" : "0"),
    "MEASure:RESistance?": () => {
      const shown = circuit.displayedOhms();
      return shown === null ? OVER_RANGE : scientific(shown, 5);
    },
    "MEASure:VOLTage?": () => scientific(circuit.terminalVolts(), 4),
  });
}

/** MEASure:VOLTage? and MEASure:CURRent? at the terminals, with a little noise. */
export function simulatedMeter(bench: Bench, circuit: SimulatedCircuit): ScpiDevice {
  let readings = 0;
  const noisy = (value: number, floor: number) => {
    const noise = hashNormal(bench.simulation!.seed, 7, readings++);
    return value * (1 + METER_NOISE_SHARE * noise) + floor * noise;
  };
  return new ScpiDevice("meter", () => `Lindqvist,VM-6,M-${bench.simulation!.seed},${FIRMWARE}`, {
    "MEASure:VOLTage[:DC]?": () => scientific(noisy(circuit.terminalVolts(), METER_NOISE_VOLTS), 6),
    "MEASure:CURRent[:DC]?": () => scientific(noisy(circuit.terminalAmperes(), 1e-12), 6),
  });
}

/** MEASure:TEMPerature? and MEASure:HUMidity? of a room that drifts a little through the day. */
export function simulatedRoomSensor(bench: Bench, clock: Clock): ScpiDevice {
  const { seed, roomCelsius, roomHumidityPercent } = bench.simulation!;
  const drift = (phase: number) => Math.sin((2 * Math.PI * clock.monotonicMs()) / 86_400_000 + phase + seed);
  return new ScpiDevice("room-sensor", () => `Lindqvist,TH-1,T-${seed},${FIRMWARE}`, {
    "MEASure:TEMPerature?": () => (roomCelsius + 0.3 * drift(0)).toFixed(2),
    "MEASure:HUMidity?": () => (roomHumidityPercent + 1.5 * drift(1)).toFixed(1),
  });
}

function scientific(value: number, digits: number): string {
  const text = value.toExponential(digits).toUpperCase();
  return value < 0 ? text : `+${text}`;
}
