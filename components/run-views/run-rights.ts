import type { RunCommand } from "@/lib/schemas/run";

/** Which commands this person may give to a run. */
export type RunRights = Readonly<Record<RunCommand["kind"], boolean>>;
