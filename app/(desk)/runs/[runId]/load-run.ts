import { notFound } from "next/navigation";
import { cache } from "react";
import { can } from "@/lib/auth/permissions";
import type { RunState } from "@/lib/journal/run-state";
import type { Person } from "@/lib/schemas/person";
import { presentPerson, requirePerson } from "@/lib/server/page-guard";
import { getServices } from "@/lib/server/services";

/** Commands that this person may give to a run. */
export interface RunRights {
  hold: boolean;
  resume: boolean;
  skip: boolean;
  stop: boolean;
}

export interface LoadedRun {
  runId: string;
  person: Person;
  state: RunState;
  rights: RunRights;
  /** When it was read, for times that count. */
  nowMs: number;
}

/** The run of this URL as its journal tells it. Not found for an unknown run; to sign-in without a session. */
export async function loadRun(params: Promise<{ runId: string }>): Promise<LoadedRun> {
  const person = await requirePerson("run.watch");
  const { runId } = await params;
  const state = await readState(runId);
  if (!state?.setup) notFound();
  return { runId, person, state, rights: rightsOf(person), nowMs: Date.now() };
}

export function rightsOf(person: Person): RunRights {
  return {
    hold: can(person, "run.hold"),
    resume: can(person, "run.resume"),
    skip: can(person, "run.skip"),
    stop: can(person, "run.stop"),
  };
}

/** Title for the browser's tab; it tells nothing without a session. */
export async function runTitle(params: Promise<{ runId: string }>, page: string): Promise<string> {
  if (!(await presentPerson())) return "Stepwell";
  const { runId } = await params;
  const setup = (await readState(runId))?.setup;
  if (!setup) return "Run · Stepwell";
  const { maker, model } = setup.unit.model;
  return `Run ${setup.runNumber}, ${maker} ${model} ${setup.unit.assetNumber}: ${page} · Stepwell`;
}

const readState = cache((runId: string): Promise<RunState | null> => getServices().runs.state(runId));
