import type { Bench } from "@/lib/schemas/bench";
import type { Standard, Unit, UnitModel } from "@/lib/schemas/instrument";
import type { JournalColumns, ReadingColumns } from "@/lib/schemas/journal-columns";
import type { Person } from "@/lib/schemas/person";
import type { RecipeVersion } from "@/lib/schemas/recipe";
import type { RunQuery, RunSummary, SaveRecipe } from "@/lib/schemas/run";
import type { RunEvent } from "@/lib/schemas/run-event";

/** The journal of runs. Records are only ever inserted. */
export interface JournalRepository {
  /** Commits a batch in one transaction and extends the hash chain. Throws JournalGapError unless it continues the run's last `seq`. */
  append(runId: string, records: RunEvent[]): Promise<void>;
  /** Records after `afterSeq` in order, events and readings merged. */
  records(runId: string, options: { afterSeq: number; limit: number }): Promise<RunEvent[]>;
  /** All events without readings, in order. */
  events(runId: string): Promise<RunEvent[]>;
  readings(runId: string, options: { point?: number | undefined }): Promise<ReadingColumns>;
  /** The whole journal as it stands at one moment. */
  columns(runId: string): Promise<JournalColumns>;
  /** 0 for a run without records. */
  lastSeq(runId: string): Promise<number>;
  /**
   * Whether the records are those that were written; else the first record of the first batch that is not.
   * A journal from whose end whole batches were taken away looks intact: only its last hash, kept elsewhere, shows that.
   */
  verifyChain(runId: string): Promise<{ intact: true } | { intact: false; firstBadSeq: number }>;
}

export interface PeopleRepository {
  list(): Promise<Person[]>;
  count(): Promise<number>;
  get(id: string): Promise<Person | null>;
  findByEmail(email: string): Promise<{ person: Person; passwordHash: string } | null>;
  create(person: Omit<Person, "id">, passwordHash: string): Promise<Person>;
  setActive(id: string, active: boolean): Promise<void>;
}

/** A session as stored: the hash of its id, never the id. */
export interface StoredSession {
  idHash: string;
  personId: string;
  createdAtMs: number;
  lastSeenAtMs: number;
  expiresAtMs: number;
}

export interface SessionsRepository {
  create(session: StoredSession): Promise<void>;
  find(idHash: string): Promise<StoredSession | null>;
  touch(idHash: string, lastSeenAtMs: number): Promise<void>;
  remove(idHash: string): Promise<void>;
  /** Removes all sessions of a person and returns their hashes. */
  removeAllOf(personId: string): Promise<string[]>;
  removeExpired(nowMs: number): Promise<void>;
}

export interface UnitsRepository {
  /** Units whose asset or serial number or model contains `search`; all for an empty one. */
  list(search: string): Promise<Unit[]>;
  get(id: string): Promise<Unit | null>;
  create(unit: Unit): Promise<void>;
}

export interface UnitModelsRepository {
  list(): Promise<UnitModel[]>;
  create(model: UnitModel): Promise<void>;
}

export interface StandardsRepository {
  list(): Promise<Standard[]>;
  create(standard: Standard): Promise<void>;
}

export interface BenchesRepository {
  /** Benches with their standard, in the order of their names as the site lists them. */
  list(): Promise<Bench[]>;
  create(bench: Bench, position: number): Promise<void>;
}

export interface RecipesRepository {
  /** The newest version of each recipe, released or not. */
  list(): Promise<RecipeVersion[]>;
  /** The newest released version of each recipe. */
  listReleased(): Promise<RecipeVersion[]>;
  /** All versions of one recipe, newest first; empty for an unknown one. */
  versions(recipeId: string): Promise<RecipeVersion[]>;
  getVersion(versionId: string): Promise<RecipeVersion | null>;
  /** Makes a new recipe's version 1. */
  create(recipe: SaveRecipe, by: string): Promise<RecipeVersion>;
  /** Changes the draft of a recipe, or begins its next version when the newest is released. A released version never changes. */
  save(recipeId: string, recipe: SaveRecipe, by: string): Promise<RecipeVersion>;
}

export interface RunsRepository {
  /** Takes the next run number for a run on this bench. The database refuses a second active run on a bench. */
  reserve(run: { runId: string; benchId: string; unitId: string }): Promise<number>;
  /** Removes a reserved run that never got a record. */
  forget(runId: string): Promise<void>;
  updateSummary(summary: RunSummary): Promise<void>;
  get(runId: string): Promise<RunSummary | null>;
  query(query: RunQuery): Promise<{ rows: RunSummary[]; total: number }>;
  activeOnBench(benchId: string): Promise<{ runId: string } | null>;
  /** The latest ended run of a unit, if any. */
  latestOfUnit(unitId: string): Promise<RunSummary | null>;
}

export interface SiteSettingsRepository {
  get(key: string): Promise<string | null>;
  set(key: string, value: string): Promise<void>;
}

/** Client-made ids that have been acted on, so that a repeated send acts once. */
export interface CommandsSeenRepository {
  /** Keeps the id with its outcome; false when it was there already. */
  claim(id: string, outcome: string): Promise<boolean>;
  /** The outcome kept with an id, if any. */
  find(id: string): Promise<string | null>;
}

/** All data of Stepwell, as plain objects in the shapes of lib/schemas. */
export interface Repositories {
  journal: JournalRepository;
  people: PeopleRepository;
  sessions: SessionsRepository;
  units: UnitsRepository;
  unitModels: UnitModelsRepository;
  standards: StandardsRepository;
  benches: BenchesRepository;
  recipes: RecipesRepository;
  runs: RunsRepository;
  siteSettings: SiteSettingsRepository;
  commandsSeen: CommandsSeenRepository;
}
