import type { Sequelize } from "sequelize";

const PRAGMAS = [
  "PRAGMA journal_mode = WAL",
  "PRAGMA synchronous = FULL",
  "PRAGMA foreign_keys = ON",
  "PRAGMA busy_timeout = 2000",
  "PRAGMA trusted_schema = OFF",
  // Without it INSERT OR REPLACE would remove a row past the triggers that refuse a deletion.
  "PRAGMA recursive_triggers = ON",
].join(";");

/** A connection of the sqlite3 package, as far as we use it. */
export interface Connection {
  exec(sql: string, done: (error: Error | null) => void): void;
  run(sql: string, values: readonly unknown[], done: (error: Error | null) => void): void;
  close(done: (error: Error | null) => void): void;
}

/** Sequelize's keeper of SQLite connections, as far as we rely on it. */
interface ConnectionManager {
  connections: Record<string, Connection>;
  getConnection(options?: { uuid?: string }): Promise<Connection>;
}

function managerOf(sequelize: Sequelize): ConnectionManager {
  return sequelize.connectionManager as unknown as ConnectionManager;
}

/** Sequelize runs no hook for a new SQLite connection, so its source of connections is wrapped. */
export function setPragmasOnEveryConnection(sequelize: Sequelize): void {
  const manager = managerOf(sequelize);
  const open = manager.getConnection.bind(manager);
  const prepared = new WeakMap<Connection, Promise<void>>();
  manager.getConnection = async (options) => {
    const connection = await open(options);
    let ready = prepared.get(connection);
    if (!ready) prepared.set(connection, (ready = execute(connection, PRAGMAS)));
    await ready;
    return connection;
  };
}

/** The connection of that name, opened when there is none; `sequelize.close()` closes it. */
export function openConnection(sequelize: Sequelize, name: string): Promise<Connection> {
  return managerOf(sequelize).getConnection({ uuid: name });
}

/** Closes the connection of that name, so that the next use opens a new one. */
export async function dropConnection(sequelize: Sequelize, name: string): Promise<void> {
  const { connections } = managerOf(sequelize);
  const connection = connections[name];
  delete connections[name];
  if (!connection) return;
  await new Promise<void>((resolve, reject) => connection.close((error) => (error ? reject(error) : resolve())));
}

/** Runs statements without results. */
export function execute(connection: Connection, sql: string): Promise<void> {
  return new Promise((resolve, reject) => connection.exec(sql, (error) => (error ? reject(error) : resolve())));
}
