import type { QueryInterface, Transaction } from "sequelize";

const statements = [
  `CREATE TABLE people (
    id TEXT PRIMARY KEY, email TEXT NOT NULL UNIQUE, name TEXT NOT NULL, roles TEXT NOT NULL,
    active INTEGER NOT NULL, password_hash TEXT NOT NULL, created_at_ms INTEGER NOT NULL)`,
  `CREATE TABLE sessions (
    id_hash TEXT PRIMARY KEY, person_id TEXT NOT NULL REFERENCES people(id),
    created_at_ms INTEGER NOT NULL, last_seen_at_ms INTEGER NOT NULL, expires_at_ms INTEGER NOT NULL)`,
  `CREATE INDEX sessions_person ON sessions(person_id)`,
  `CREATE TABLE unit_models (id TEXT PRIMARY KEY, document TEXT NOT NULL)`,
  `CREATE TABLE units (
    id TEXT PRIMARY KEY, model_id TEXT NOT NULL REFERENCES unit_models(id), serial_number TEXT NOT NULL,
    asset_number TEXT NOT NULL UNIQUE, simulation TEXT)`,
  `CREATE TABLE standards (id TEXT PRIMARY KEY, document TEXT NOT NULL)`,
  `CREATE TABLE benches (
    id TEXT PRIMARY KEY, position INTEGER NOT NULL, standard_id TEXT NOT NULL REFERENCES standards(id), document TEXT NOT NULL)`,
  `CREATE TABLE recipe_versions (
    id TEXT PRIMARY KEY, recipe_id TEXT NOT NULL, version INTEGER NOT NULL, state TEXT NOT NULL, document TEXT NOT NULL,
    model_ids TEXT NOT NULL, changed_by TEXT NOT NULL, changed_at_ms INTEGER NOT NULL, UNIQUE (recipe_id, version))`,
  `CREATE TRIGGER recipe_versions_released_stay
    BEFORE UPDATE OF id, recipe_id, version, document, model_ids, changed_by, changed_at_ms ON recipe_versions
    WHEN OLD.state <> 'draft' BEGIN SELECT RAISE(ABORT, 'a released recipe version never changes'); END`,
  `CREATE TRIGGER recipe_versions_no_way_back BEFORE UPDATE OF state ON recipe_versions
    WHEN OLD.state <> 'draft' AND NEW.state = 'draft'
    BEGIN SELECT RAISE(ABORT, 'a released recipe version is no draft any more'); END`,
  `CREATE TRIGGER recipe_versions_released_remain BEFORE DELETE ON recipe_versions
    WHEN OLD.state <> 'draft' BEGIN SELECT RAISE(ABORT, 'a released recipe version is never deleted'); END`,
  `CREATE TABLE runs (
    id TEXT PRIMARY KEY, number INTEGER NOT NULL UNIQUE, bench_id TEXT NOT NULL REFERENCES benches(id),
    unit_id TEXT NOT NULL REFERENCES units(id), is_active INTEGER NOT NULL, status TEXT, started_at_ms INTEGER,
    outside INTEGER, unit_name TEXT, asset_number TEXT, recipe_name TEXT, bench_name TEXT, started_by TEXT, summary TEXT)`,
  `CREATE UNIQUE INDEX runs_one_active_per_bench ON runs(bench_id) WHERE is_active = 1`,
  `CREATE INDEX runs_unit ON runs(unit_id, number)`,
  `CREATE TABLE run_events (
    run_id TEXT NOT NULL REFERENCES runs(id), seq INTEGER NOT NULL, at_ms INTEGER NOT NULL, elapsed_ms INTEGER NOT NULL,
    type TEXT NOT NULL, data TEXT NOT NULL, PRIMARY KEY (run_id, seq)) WITHOUT ROWID`,
  `CREATE TABLE readings (
    run_id TEXT NOT NULL REFERENCES runs(id), seq INTEGER NOT NULL, at_ms INTEGER NOT NULL, elapsed_ms INTEGER NOT NULL,
    point INTEGER NOT NULL, attempt INTEGER NOT NULL, phase TEXT NOT NULL, ohms REAL, volts REAL, amperes REAL,
    flags TEXT NOT NULL, raw TEXT NOT NULL, PRIMARY KEY (run_id, seq)) WITHOUT ROWID`,
  `CREATE TABLE journal_batches (
    run_id TEXT NOT NULL REFERENCES runs(id), first_seq INTEGER NOT NULL, last_seq INTEGER NOT NULL, hash TEXT NOT NULL,
    PRIMARY KEY (run_id, last_seq)) WITHOUT ROWID`,
  ...["run_events", "readings", "journal_batches"].flatMap((table) => [
    `CREATE TRIGGER ${table}_no_update BEFORE UPDATE ON ${table} BEGIN SELECT RAISE(ABORT, 'the journal is only ever added to'); END`,
    `CREATE TRIGGER ${table}_no_delete BEFORE DELETE ON ${table} BEGIN SELECT RAISE(ABORT, 'the journal is only ever added to'); END`,
  ]),
  `CREATE TABLE site_settings (key TEXT PRIMARY KEY, value TEXT NOT NULL)`,
  `CREATE TABLE commands_seen (id TEXT PRIMARY KEY, outcome TEXT NOT NULL, at_ms INTEGER NOT NULL)`,
];

const tables = [
  "commands_seen",
  "site_settings",
  "journal_batches",
  "readings",
  "run_events",
  "runs",
  "recipe_versions",
  "benches",
  "standards",
  "units",
  "unit_models",
  "sessions",
  "people",
];

export async function up({ sequelize }: QueryInterface, transaction: Transaction): Promise<void> {
  for (const statement of statements) await sequelize.query(statement, { transaction });
}

export async function down({ sequelize }: QueryInterface, transaction: Transaction): Promise<void> {
  for (const table of tables) await sequelize.query(`DROP TABLE ${table}`, { transaction });
}
