import { spawn, type ChildProcess } from "node:child_process";
import { createInterface } from "node:readline";
import { fileURLToPath } from "node:url";

const root = fileURLToPath(new URL("../..", import.meta.url));

export interface TestChild {
  child: ChildProcess;
  /** Lines that it wrote so far. */
  lines: string[];
  /** Resolves when so many lines have been written; rejects when it ends before. */
  wrote(count: number): Promise<void>;
  kill(): Promise<void>;
}

/** Runs one script of tests/data in a process of its own. */
export function startChild(script: string, ...args: string[]): TestChild {
  const child = spawn(process.execPath, ["--import", "tsx", `tests/data/${script}`, ...args], {
    cwd: root,
    stdio: ["ignore", "pipe", "pipe"],
  });
  const lines: string[] = [];
  let errors = "";
  const listeners = new Set<() => void>();
  const tell = () => listeners.forEach((listener) => listener());
  child.stderr.on("data", (chunk: Buffer) => (errors += chunk.toString()));
  createInterface({ input: child.stdout }).on("line", (line) => {
    lines.push(line);
    tell();
  });
  const exited = new Promise<void>((resolve) => child.once("exit", () => resolve()));
  void exited.then(tell);
  return {
    child,
    lines,
    wrote: (count) =>
      new Promise((resolve, reject) => {
        const look = () => {
          if (lines.length >= count) resolve();
          else if (child.exitCode !== null || child.signalCode !== null)
            reject(new Error(`${script} ended: ${errors}`));
        };
        listeners.add(look);
        look();
      }),
    kill: async () => {
      child.kill("SIGKILL");
      await exited;
    },
  };
}
