import { spawn, type ChildProcess } from "node:child_process";
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { fileURLToPath } from "node:url";

const root = fileURLToPath(new URL("../..", import.meta.url));
const READY = /^Stepwell is ready at (http:\/\/localhost:\d+)/mu;
const START_TIMEOUT_MS = 150_000;

export interface ServerProcess {
  url: string;
  dataFolder: string;
  child: ChildProcess;
  /** All that the server wrote so far. */
  output: () => string;
  /** Ends the process with a signal and resolves when it is gone. */
  kill: (signal: NodeJS.Signals) => Promise<void>;
}

/** A data folder of its own; `remove` deletes it. */
export function temporaryDataFolder(): { dataFolder: string; remove: () => void } {
  const dataFolder = mkdtempSync(path.join(tmpdir(), "stepwell-test-"));
  return { dataFolder, remove: () => rmSync(dataFolder, { recursive: true, force: true }) };
}

/** Starts the real server (production pages must be built) on a free port. Rejects with its output when it does not get ready. */
export function startServer(dataFolder: string, environment: Record<string, string> = {}): Promise<ServerProcess> {
  const child = spawn(process.execPath, ["--import", "tsx", "server.ts"], {
    cwd: root,
    env: {
      ...process.env,
      NODE_ENV: "production",
      PORT: "0",
      STEPWELL_DATA: dataFolder,
      STEPWELL_LOG: "warn",
      ...environment,
    },
    stdio: ["ignore", "pipe", "pipe"],
  });
  let output = "";
  const exited = new Promise<void>((resolve) => child.once("exit", () => resolve()));
  return new Promise((resolve, reject) => {
    const fail = (why: string) => reject(new Error(`the server ${why}:\n${output}`));
    const timer = setTimeout(() => fail("did not get ready"), START_TIMEOUT_MS);
    const listen = (chunk: Buffer) => {
      output += chunk.toString();
      const url = READY.exec(output)?.[1];
      if (!url) return;
      clearTimeout(timer);
      const kill = async (signal: NodeJS.Signals) => {
        child.kill(signal);
        await exited;
      };
      resolve({ url, dataFolder, child, output: () => output, kill });
    };
    child.stdout.on("data", listen);
    child.stderr.on("data", listen);
    child.once("exit", (code) => {
      clearTimeout(timer);
      fail(`ended with code ${code}`);
    });
  });
}
