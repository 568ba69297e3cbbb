import { createServer } from "node:http";
import type { AddressInfo } from "node:net";
import next from "next";
import { layDemo } from "@/lib/composition/lay-demo";
import { openAuth } from "@/lib/composition/open-auth";
import { openData } from "@/lib/composition/open-data";
import { openBenches } from "@/lib/composition/open-benches";
import { openServices } from "@/lib/composition/open-services";
import { DEMO_PASSWORD, demoPeople } from "@/lib/data/demo/demo-people";
import { RunFeed } from "@/lib/engine/run-feed";
import { readConfig } from "@/lib/server/config";
import { openLog } from "@/lib/server/log";
import { requestListener } from "@/lib/server/request-listener";
import { provideServices } from "@/lib/server/services";
import { openSocketGateway } from "@/lib/server/socket-gateway";
import packageJson from "./package.json" with { type: "json" };

/** A stop that takes longer than this is cut off; the benches are made safe first. */
const LONGEST_STOP_MS = 10_000;

const config = readConfig(process.env);
const log = openLog(config.logLevel);

const { database, repositories } = await openData(config.dataFolder);
const opened = openAuth(repositories, config);
const feed = new RunFeed();
const benchDependencies = {
  repositories,
  feed,
  dataFolder: config.dataFolder,
  appVersion: packageJson.version,
  nowMs: Date.now,
  onTrouble: log.error,
};
if (config.demo !== "off") await layDemo(benchDependencies, opened.passwords, config.demo === "on");

// Benches are made safe and recovered before anybody can reach them.
const { roster, close: closeBenches } = await openBenches(benchDependencies);
provideServices(openServices({ config, repositories, opened, roster, log }));

const server = createServer();
const app = next({
  dev: config.isDevelopment,
  dir: import.meta.dirname,
  hostname: config.host,
  port: config.port,
  httpServer: server,
});
await app.prepare();
const { allowedHosts } = config;
server.on("request", requestListener({ handle: app.getRequestHandler(), allowedHosts, onError: log.error }));
const gateway = openSocketGateway({
  server,
  allowedHosts,
  feed,
  authenticate: async (cookieHeader) => {
    const session = await opened.sessions.find(cookieHeader);
    return session && { sessionId: session.idHash, personId: session.person.id };
  },
  isSessionValid: ({ sessionId }) => opened.sessions.isValid(sessionId),
  onSessionRevoked: (listener) => opened.sessions.onRevoked(listener),
  snapshots: () => roster.snapshots(),
  records: (runId, options) => repositories.journal.records(runId, options),
  onError: log.error,
});
server.requestTimeout = 30_000;
server.headersTimeout = 15_000;
server.listen(config.port, config.host, () => announce((server.address() as AddressInfo).port));

function announce(port: number): void {
  const names = demoPeople.map(({ email, roles }) => `${email} (${roles[0]})`).join(", ");
  const demo = config.demo === "off" ? "" : `. Demo laboratory, password ${DEMO_PASSWORD}: ${names}`;
  process.stdout.write(`Stepwell is ready at http://localhost:${port}${demo}\n`);
}

let isStopping = false;

/** Runs the boot backwards: the outputs are off and proven off before anything else ends. */
async function stop(exitCode: number): Promise<void> {
  if (isStopping) return;
  isStopping = true;
  setTimeout(() => process.exit(exitCode || 1), LONGEST_STOP_MS).unref();
  try {
    await closeBenches();
    await gateway.close();
    await app.close();
    await opened.passwords.close();
    await database.close();
  } catch (error) {
    log.error("Stepwell could not stop cleanly", error);
    process.exit(exitCode || 1);
  }
  process.exit(exitCode);
}

process.on("SIGTERM", () => void stop(0));
process.on("SIGINT", () => void stop(0));
process.on("uncaughtException", (error) => {
  log.error("a fault that nobody caught; the benches are made safe and Stepwell ends", error);
  void stop(1);
});
