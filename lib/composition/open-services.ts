import { foldJournal } from "@/lib/engine/recovery";
import type { BenchRoster } from "@/lib/engine/bench-roster";
import type { Repositories } from "@/lib/data/repositories";
import type { Config } from "@/lib/server/config";
import type { Log } from "@/lib/server/log";
import type { Services } from "@/lib/server/services";
import { openSite, type OpenedAuth } from "./open-auth";

export interface ServicesInput {
  config: Config;
  repositories: Repositories;
  opened: OpenedAuth;
  roster: BenchRoster;
  log: Log;
}

/** What pages and route handlers may reach. */
export function openServices({ config, repositories, opened, roster, log }: ServicesInput): Services {
  return {
    site: openSite(repositories, opened, config.demo !== "off"),
    auth: opened.auth,
    repositories,
    benches: roster,
    runs: {
      state: async (runId) => {
        const live = roster.liveState(runId);
        if (live) return live;
        const folded = await foldJournal(repositories.journal, runId);
        return folded.status === "empty" ? null : folded;
      },
    },
    allowedHosts: config.allowedHosts,
    log,
  };
}
