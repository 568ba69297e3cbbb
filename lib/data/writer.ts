import { AsyncLocalStorage } from "node:async_hooks";
import PQueue from "p-queue";
import { Transaction, type Sequelize } from "sequelize";
import { dropConnection, execute, openConnection, type Connection } from "./connections";

const NAME = "writer";

/** What Sequelize's statements look at in the transaction that they are given. */
interface TransactionState {
  connection: Connection;
  /** Once set, Sequelize refuses further statements of this transaction. */
  finished?: "commit" | "rollback";
}

export interface Writer {
  /**
   * Runs `act` in a transaction of its own, begun IMMEDIATE, after all earlier ones.
   * Throws RangeError inside another write, which would wait for it for ever.
   */
  write<T>(act: (transaction: Transaction) => Promise<T>): Promise<T>;
  /** Resolves when nothing is left to write. */
  idle(): Promise<void>;
}

/**
 * Writes one transaction after the other on one connection. Sequelize's own transactions open a connection each, and
 * keep the database locked after a commit that failed; here such a connection is closed.
 */
export function createWriter(sequelize: Sequelize): Writer {
  const queue = new PQueue({ concurrency: 1 });
  const inside = new AsyncLocalStorage<true>();

  const runTransaction = async <T>(act: (transaction: Transaction) => Promise<T>): Promise<T> => {
    const connection = await openConnection(sequelize, NAME);
    const transaction = new Transaction(sequelize, {});
    const state = transaction as unknown as TransactionState;
    state.connection = connection;
    await execute(connection, "BEGIN IMMEDIATE");
    try {
      const result = await act(transaction);
      state.finished = "commit";
      await execute(connection, "COMMIT");
      return result;
    } catch (error) {
      state.finished = "rollback";
      await rollBack(connection);
      throw error;
    }
  };

  const rollBack = async (connection: Connection) => {
    try {
      await execute(connection, "ROLLBACK");
    } catch {
      // SQLite rolls back by itself when the disk is full; else closing does.
      await dropConnection(sequelize, NAME);
    }
  };

  return {
    write: async (act) => {
      if (inside.getStore()) throw new RangeError("a write can't begin inside another: hand on its transaction");
      return queue.add(() => inside.run(true, () => runTransaction(act)));
    },
    idle: () => queue.onIdle(),
  };
}
