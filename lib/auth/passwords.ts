import { Worker } from "node:worker_threads";

const COST = 12;
/** bcrypt reads no byte beyond this. */
const MOST_BYTES = 72;

/** A hash of no password at all, so that an unknown person costs the same time as a known one. */
const DUMMY_HASH = "$2b$12$xlyxMYUK7R8UDptzSLn4meASE3HshlzWfr2/C55dteCibreevkBvm";

interface Question {
  kind: "hash" | "verify";
  password: string;
  hash?: string;
  cost?: number;
}

interface Answer {
  id: number;
  result?: unknown;
  /** Why there is no result. */
  failure?: string;
}

interface Waiting {
  resolve: (result: unknown) => void;
  reject: (error: Error) => void;
}

/** Hashes and checks passwords in a thread of its own, begun at the first question. */
export class Passwords {
  #worker: Worker | null = null;
  readonly #waiting = new Map<number, Waiting>();
  #nextId = 0;
  #isClosed = false;

  /** Throws RangeError for a password of more than 72 bytes, which bcrypt would cut in silence. */
  async hash(password: string): Promise<string> {
    if (byteLength(password) > MOST_BYTES) throw new RangeError(`a password has at most ${MOST_BYTES} bytes`);
    return (await this.#ask({ kind: "hash", password, cost: COST })) as string;
  }

  /** Whether the password belongs to the hash; without a hash the same work is done for a plain no. */
  async verify(password: string, hash: string | null): Promise<boolean> {
    const isMatch = (await this.#ask({ kind: "verify", password, hash: hash ?? DUMMY_HASH })) as boolean;
    return isMatch && hash !== null && byteLength(password) <= MOST_BYTES;
  }

  async close(): Promise<void> {
    this.#isClosed = true;
    await this.#worker?.terminate();
  }

  #ask(question: Question): Promise<unknown> {
    if (this.#isClosed) return Promise.reject(new Error("Passwords are not checked any more: Stepwell is stopping."));
    const worker = (this.#worker ??= this.#start());
    const id = this.#nextId++;
    return new Promise((resolve, reject) => {
      this.#waiting.set(id, { resolve, reject });
      worker.ref();
      worker.postMessage({ id, ...question });
    });
  }

  #start(): Worker {
    const worker = new Worker(new URL("./password-worker.mjs", import.meta.url), { execArgv: [] });
    worker.on("message", (answer: Answer) => this.#settle(worker, answer));
    worker.on("error", (error) => this.#end(worker, error as Error));
    worker.on("exit", () => this.#end(worker, new Error("The thread that checks passwords has ended.")));
    return worker;
  }

  /** The thread keeps the process alive only while somebody waits for it. */
  #settle(worker: Worker, { id, result, failure }: Answer): void {
    const waiting = this.#waiting.get(id);
    this.#waiting.delete(id);
    if (this.#waiting.size === 0) worker.unref();
    if (failure === undefined) waiting?.resolve(result);
    else waiting?.reject(new Error(`A password could not be checked: ${failure}`));
  }

  /** Nobody waits for a thread that is gone; the next question starts another. */
  #end(worker: Worker, error: Error): void {
    if (this.#worker !== worker) return;
    this.#worker = null;
    for (const { reject } of this.#waiting.values()) reject(error);
    this.#waiting.clear();
  }
}

function byteLength(text: string): number {
  return new TextEncoder().encode(text).length;
}
