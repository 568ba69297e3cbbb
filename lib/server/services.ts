import type { SignInOutcome } from "@/lib/auth/sign-in";
import type { Repositories } from "@/lib/data/repositories";
import type { RunState } from "@/lib/journal/run-state";
import type { BenchSnapshot } from "@/lib/schemas/bench";
import type { Actor, FirstRun, Person, SignIn } from "@/lib/schemas/person";
import type { Preflight, PreflightRequest, RunCommand, StartRun } from "@/lib/schemas/run";

/** Benches and the runs on them, as the web may use them. */
export interface BenchServices {
  snapshots(): BenchSnapshot[];
  /** How fast the bench's time runs; 1 on hardware. */
  clockSpeed(benchId: string): number;
  preflight(request: PreflightRequest): Promise<Preflight>;
  start(request: StartRun, by: Actor): Promise<{ runId: string }>;
  command(runId: string, command: RunCommand, by: Actor): Promise<void>;
}

export interface RunServices {
  /** Live state of an active run, else the folded journal; null for an unknown run. */
  state(runId: string): Promise<RunState | null>;
}

export interface AuthServices {
  /** Checks the password; the cookie is the whole `Set-Cookie` value. */
  signIn(form: SignIn, address: string): Promise<SignInOutcome>;
  /** Ends the session of this cookie header; the result is the `Set-Cookie` value that removes it. */
  signOut(cookieHeader: string): Promise<string>;
  /** The person of a valid session; null otherwise. */
  personOf(cookieHeader: string): Promise<Person | null>;
}

export interface SiteServices {
  readonly isDemo: boolean;
  /** Name and place, read afresh: `{ name: "Thornmere Wind Service", place: "instrument workshop" }`. */
  describe(): Promise<{ name: string; place: string }>;
  /** No person yet: only the first-run page is served. */
  isEmpty(): Promise<boolean>;
  /** Names the site and makes its administrator, once. The cookie signs the administrator in. */
  setUp(form: FirstRun): Promise<{ cookie: string }>;
}

/** Everything that pages and route handlers may reach. Made once by server.ts. */
export interface Services {
  site: SiteServices;
  auth: AuthServices;
  repositories: Repositories;
  benches: BenchServices;
  runs: RunServices;
  allowedHosts: readonly string[];
  log: { error(message: string, error: unknown): void };
}

const key = Symbol.for("stepwell.services");

/** Shares the services with the web bundle, which holds its own copy of every module. */
export function provideServices(services: Services): void {
  (globalThis as Record<symbol, unknown>)[key] = services;
}

/** Throws Error when Stepwell was not started through server.ts. */
export function getServices(): Services {
  const services = (globalThis as Record<symbol, unknown>)[key];
  if (!services)
    throw new Error("Start Stepwell through server.ts (npm start or npm run dev), not with the next command.");
  return services as Services;
}
