import { existsSync, mkdirSync, readFileSync, renameSync, writeFileSync } from "node:fs";
import path from "node:path";
import type { SimulatedBenchOptions, SimulationMemory } from "@/drivers/simulated/simulated-bench";

/** Keeps a simulated bench's state in the data folder, so that its output stays on when the server is killed, as hardware's does. */
export function simulationMemory(dataFolder: string, benchId: string): NonNullable<SimulatedBenchOptions["memory"]> {
  const folder = path.join(dataFolder, "simulation");
  const file = path.join(folder, `${benchId}.json`);
  mkdirSync(folder, { recursive: true });
  return {
    load: () => (existsSync(file) ? (JSON.parse(readFileSync(file, "utf8")) as SimulationMemory) : null),
    save: (memory) => {
      // Written beside and renamed, so that a kill never leaves half a file.
      writeFileSync(`${file}.new`, JSON.stringify(memory));
      renameSync(`${file}.new`, file);
    },
  };
}
