import { Worker } from "node:worker_threads";

const COST = 12;
/** bcrypt reads no byte beyond this. */
const MOST_BYTES = 72;

/** A hash of no password at all, so that an unknown person costs the same time as a known one. */
const DUMMY_HASH = "$2b$12$xlyxMYUK7R8UDptzSLn4meASE3HshlzWfr2/C55dteCibreevkBvm";

interface Answer {
  id: number;
  result: unknown;
}

/** Hashes and checks passwords in a thread of its own. */
export class Passwords {
  readonly #worker: Worker;
  readonly #waiting = new Map<number, { resolve: (result: unknown) => void; reject: (error: Error) => void }>();
  #nextId = 0;

  constructor() {
    this.#worker = new Worker(new URL("./password-worker.mjs", import.meta.url), { execArgv: [] });
    this.#worker.unref();
    this.#worker.on("message", ({ id, result }: Answer) => {
      this.#waiting.get(id)?.resolve(result);
      this.#waiting.delete(id);
    });
    this.#worker.on("error", (error) => this.#failAll(error as Error));
  }

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
    await this.#worker.terminate();
    this.#failAll(new Error("passwords are not checked any more: Stepwell is stopping"));
  }

  #ask(question: object): Promise<unknown> {
    const id = this.#nextId++;
    return new Promise((resolve, reject) => {
      this.#waiting.set(id, { resolve, reject });
      this.#worker.postMessage({ id, ...question });
    });
  }

  #failAll(error: Error): void {
    for (const { reject } of this.#waiting.values()) reject(error);
    this.#waiting.clear();
  }
}

function byteLength(text: string): number {
  return new TextEncoder().encode(text).length;
}
