import { notFound } from "next/navigation";
import { cache } from "react";
import type { RunState } from "@/lib/journal/run-state";
import type { Person } from "@/lib/schemas/person";
import { presentPerson, requirePerson } from "@/lib/server/page-guard";
import { getServices } from "@/lib/server/services";

export interface LoadedRun {
  runId: string;
  person: Person;
  state: RunState;
  /** When it was read, for times that count. */
  nowMs: number;
}

/** The run of this URL as its journal tells it. Not found for an unknown run; to sign-in without a session. */
export async function loadRun(params: Promise<{ runId: string }>): Promise<LoadedRun> {
  const person = await requirePerson("run.watch");
  const { runId } = await params;
  const state = await readState(runId);
  if (!state?.setup) notFound();
  return { runId, person, state, nowMs: Date.now() };
}

/** Title for the browser's tab; it tells nothing without a session. */
export async function runTitle(params: Promise<{ runId: string }>, page: string): Promise<string> {
  if (!(await presentPerson())) return "Run";
  const { runId } = await params;
  const setup = (await readState(runId))?.setup;
  if (!setup) return "Run";
  const { maker, model } = setup.unit.model;
  return `Run ${setup.runNumber}, ${maker} ${model} ${setup.unit.assetNumber}: ${page}`;
}

const readState = cache((runId: string): Promise<RunState | null> => getServices().runs.state(runId));
