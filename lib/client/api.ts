import { z } from "zod";
import type { RunState } from "@/lib/journal/run-state";
import { benchSnapshotSchema, type BenchSnapshot } from "@/lib/schemas/bench";
import { unitSchema, type Unit } from "@/lib/schemas/instrument";
import type { JournalColumns, ReadingColumns } from "@/lib/schemas/journal-columns";
import type { FirstRun, SignIn } from "@/lib/schemas/person";
import { recipeVersionSchema, type RecipeVersion } from "@/lib/schemas/recipe";
import {
  preflightSchema,
  runSummarySchema,
  type Preflight,
  type PreflightRequest,
  type RunCommand,
  type RunQuery,
  type RunSummary,
  type SaveRecipe,
  type StartRun,
} from "@/lib/schemas/run";
import { errorFrom, noAnswer } from "./api-error";

const runPageSchema = z.object({ rows: z.array(runSummarySchema), total: z.int() });
const startedSchema = z.object({ runId: z.string() });
const savedSchema = z.object({ recipeId: z.string(), version: z.int() });

/** The server's resources. Every call throws ApiError, with words for people, when it is refused or not answered. */
export const api = {
  signIn: (credentials: SignIn) => send("POST", "/api/session", credentials),
  signOut: () => send("DELETE", "/api/session"),
  firstRun: (answers: FirstRun) => send("POST", "/api/first-run", answers),

  benches: async (signal?: AbortSignal): Promise<BenchSnapshot[]> =>
    z.array(benchSnapshotSchema).parse(await receive("/api/benches", signal)),

  runs: async (query: Partial<RunQuery>, signal?: AbortSignal): Promise<{ rows: RunSummary[]; total: number }> =>
    runPageSchema.parse(await receive(`/api/runs${search(query)}`, signal)),
  startRun: async (request: StartRun): Promise<{ runId: string }> =>
    startedSchema.parse(await send("POST", "/api/runs", request)),
  preflight: async (request: PreflightRequest, signal?: AbortSignal): Promise<Preflight> =>
    preflightSchema.parse(await send("POST", "/api/preflight", request, signal)),
  runState: async (runId: string, signal?: AbortSignal): Promise<RunState> =>
    (await receive(`/api/runs/${encodeURIComponent(runId)}/state`, signal)) as RunState,
  runJournal: async (runId: string, signal?: AbortSignal): Promise<JournalColumns> =>
    (await receive(`/api/runs/${encodeURIComponent(runId)}/journal`, signal)) as JournalColumns,
  pointReadings: async (runId: string, point: number, signal?: AbortSignal): Promise<ReadingColumns> =>
    (await receive(`/api/runs/${encodeURIComponent(runId)}/readings?point=${point}`, signal)) as ReadingColumns,
  commandRun: (runId: string, command: RunCommand) =>
    send("POST", `/api/runs/${encodeURIComponent(runId)}/commands`, command),

  units: async (text: string, signal?: AbortSignal): Promise<Unit[]> =>
    z
      .array(unitSchema.extend({ simulation: unitSchema.shape.simulation.default(null) }))
      .parse(await receive(`/api/units${search({ search: text })}`, signal)),

  recipes: async (signal?: AbortSignal): Promise<RecipeVersion[]> =>
    z.array(recipeVersionSchema).parse(await receive("/api/recipes", signal)),
  recipeVersions: async (recipeId: string, signal?: AbortSignal): Promise<RecipeVersion[]> =>
    z.array(recipeVersionSchema).parse(await receive(`/api/recipes/${encodeURIComponent(recipeId)}`, signal)),
  /** Makes a recipe, or the next version of `recipeId`. */
  saveRecipe: async (recipe: SaveRecipe, recipeId?: string): Promise<{ recipeId: string; version: number }> =>
    savedSchema.parse(
      await send("POST", recipeId ? `/api/recipes/${encodeURIComponent(recipeId)}` : "/api/recipes", recipe),
    ),
};

async function receive(path: string, signal?: AbortSignal): Promise<unknown> {
  return call(path, { signal });
}

async function send(method: "POST" | "DELETE", path: string, body?: unknown, signal?: AbortSignal): Promise<unknown> {
  const content =
    body === undefined ? {} : { body: JSON.stringify(body), headers: { "content-type": "application/json" } };
  return call(path, { method, signal, ...content });
}

async function call(path: string, init: RequestInit): Promise<unknown> {
  const response = await fetch(path, { credentials: "same-origin", cache: "no-store", ...init }).catch((cause) => {
    if (init.signal?.aborted) throw cause;
    throw noAnswer(cause);
  });
  if (!response.ok) throw await errorFrom(response);
  const text = await response.text();
  return text === "" ? null : (JSON.parse(text) as unknown);
}

function search(query: Record<string, string | number | undefined>): string {
  const given = Object.entries(query).filter(([, value]) => value !== undefined && value !== "");
  return given.length === 0 ? "" : `?${new URLSearchParams(given.map(([key, value]) => [key, String(value)]))}`;
}
