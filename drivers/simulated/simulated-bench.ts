import type { Clock } from "@/lib/engine/clock";
import type { Bench, DeviceRole } from "@/lib/schemas/bench";
import type { Unit } from "@/lib/schemas/instrument";
import { SimulatedCircuit, type CircuitState, type Violation } from "./circuit";
import type { LineFault } from "./faults";
import type { SimulatedDevice } from "./scpi-device";
import { SimulatedBinding, SimulatedSocket } from "./simulated-binding";
import { simulatedBox, simulatedMeter, simulatedRoomSensor, simulatedTester } from "./simulated-devices";

/** A setting that a device has received. */
export interface ReceivedSetting {
  role: DeviceRole;
  line: string;
  atMs: number;
}

/** What outlives the host: hardware keeps its output on when the computer dies, and so does the simulation. */
export interface SimulationMemory extends CircuitState {
  unit: Unit | null;
  violations: string[];
  settingsSinceOpen: ReceivedSetting[];
}

export interface SimulatedBenchOptions {
  bench: Bench;
  clock: Clock;
  /** Found state, and where to keep it. Without, the bench forgets. */
  memory?: { load(): SimulationMemory | null; save(memory: SimulationMemory): void };
}

/** Settings kept for inspection. */
const KEPT_SETTINGS = 200;

/** A bench of simulated devices on one circuit, behind a serialport binding. */
export class SimulatedBench {
  readonly circuit: SimulatedCircuit;
  readonly binding: SimulatedBinding;
  /** Settings received since the bench was opened, oldest first; queries and the setting of status registers are left out. */
  readonly settings: ReceivedSetting[] = [];
  readonly #sockets = new Map<string, SimulatedSocket>();
  readonly #earlierViolations: string[] = [];
  readonly #options: SimulatedBenchOptions;
  #unit: Unit | null = null;
  #linesReceived = 0;

  constructor(options: SimulatedBenchOptions) {
    const { bench, clock } = options;
    this.#options = options;
    this.circuit = new SimulatedCircuit({ bench, clock, onChange: () => this.#remember() });
    for (const [role, device] of Object.entries(this.#devices())) {
      const place = bench.devices.find((entry) => entry.role === role);
      if (place) this.#sockets.set(place.port, new SimulatedSocket(device, (from, line) => this.#received(from, line)));
    }
    this.binding = new SimulatedBinding(this.#sockets, clock);
    this.#restore();
  }

  /** Lines that all devices have received. */
  get linesReceived(): number {
    return this.#linesReceived;
  }

  /** Breaches of safe order and of ratings since the bench was made. Every test ends with none. */
  get violations(): readonly Violation[] {
    return this.circuit.violations;
  }

  /** Plugs a tester in, with its output off, unless it is plugged in already. */
  connectUnit(unit: Unit): void {
    if (this.#unit?.id === unit.id) return;
    this.#unit = unit;
    this.circuit.connect(unit);
  }

  inject(role: DeviceRole, fault: LineFault): void {
    this.socket(role).faults.push(fault);
  }

  unplug(role: DeviceRole): void {
    this.socket(role).unplug();
  }

  plugIn(role: DeviceRole): void {
    this.socket(role).plugIn();
  }

  /** Throws RangeError when the bench has no device of the role. */
  socket(role: DeviceRole): SimulatedSocket {
    const socket = [...this.#sockets.values()].find(({ device }) => device.role === role);
    if (!socket) throw new RangeError(`${this.#options.bench.name} has no ${role}`);
    return socket;
  }

  #devices(): Record<DeviceRole, SimulatedDevice> {
    const { bench, clock } = this.#options;
    return {
      "decade-box": simulatedBox(bench, this.circuit),
      tester: simulatedTester(this.circuit, () => this.#unit),
      meter: simulatedMeter(bench, this.circuit),
      "room-sensor": simulatedRoomSensor(bench, clock),
    };
  }

  #received({ role }: SimulatedDevice, line: string): void {
    this.#linesReceived += 1;
    if (line.includes("?") || /^\*(CLS|ESE)/iu.test(line)) return;
    this.settings.push({ role, line, atMs: this.#options.clock.nowMs() });
    if (this.settings.length > KEPT_SETTINGS) this.settings.splice(KEPT_SETTINGS / 2, 1);
    this.#remember();
  }

  #restore(): void {
    const memory = this.#options.memory?.load();
    if (!memory) return;
    this.#earlierViolations.push(...memory.violations);
    if (!memory.unit) return;
    this.#unit = memory.unit;
    this.circuit.connect(memory.unit);
    this.circuit.restore({ positions: memory.positions, testVolts: memory.testVolts, isOutputOn: memory.isOutputOn });
    this.#remember();
  }

  #remember(): void {
    if (!this.#options.memory || !this.circuit) return;
    const violations = [...this.#earlierViolations, ...this.circuit.violations.map(({ words }) => words)];
    this.#options.memory.save({
      ...this.circuit.state,
      unit: this.#unit,
      violations,
      settingsSinceOpen: this.settings,
    });
  }
}
