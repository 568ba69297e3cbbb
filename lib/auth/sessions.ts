import { createHash, randomBytes } from "node:crypto";
import { sealData, unsealData } from "iron-session";
import type { Repositories, StoredSession } from "@/lib/data/repositories";
import type { Person } from "@/lib/schemas/person";

const HOUR_MS = 3_600_000;
/** A shift: a technician who left a run to itself comes back signed in. An open page counts as use. */
const IDLE_MS = 12 * HOUR_MS;
/** A page that is never closed watches the longest runs to their end, and no longer than a week. */
const LONGEST_MS = 7 * 24 * HOUR_MS;
/** `lastSeenAtMs` is written at most so often. */
const TOUCH_MS = 60_000;
/** Lifetime of cookie and seal. */
const SECONDS = LONGEST_MS / 1000;

export interface SessionsOptions {
  secret: string;
  secureCookies: boolean;
  nowMs: () => number;
}

export interface ValidSession {
  idHash: string;
  person: Person;
}

/** Sessions held on the server: the sealed cookie carries a random id, the database its hash. Revoked ones end at once. */
export class Sessions {
  readonly #revokedListeners = new Set<(idHash: string) => void>();

  constructor(
    private readonly repositories: Pick<Repositories, "sessions" | "people">,
    private readonly options: SessionsOptions,
  ) {}

  /** Begins a session; the result is the whole `Set-Cookie` value. */
  async begin(personId: string): Promise<string> {
    const id = randomBytes(32).toString("base64url");
    const now = this.options.nowMs();
    await this.repositories.sessions.removeExpired(now);
    await this.repositories.sessions.create({
      idHash: hashOf(id),
      personId,
      createdAtMs: now,
      lastSeenAtMs: now,
      expiresAtMs: now + LONGEST_MS,
    });
    return this.#cookie(await sealData({ id }, { password: this.options.secret, ttl: SECONDS }), SECONDS);
  }

  /** The valid session of a `Cookie` header, if any. Counts as use. */
  async find(cookieHeader: string): Promise<ValidSession | null> {
    const idHash = await this.#idHashOf(cookieHeader);
    return idHash === null ? null : this.#valid(idHash);
  }

  /** Whether a session found earlier still holds. Counts as use. */
  async isValid(idHash: string): Promise<boolean> {
    return (await this.#valid(idHash)) !== null;
  }

  /** Ends the session of a `Cookie` header; the result is the `Set-Cookie` value that removes it. */
  async end(cookieHeader: string): Promise<string> {
    const idHash = await this.#idHashOf(cookieHeader);
    if (idHash !== null) await this.#revoke(idHash);
    return this.#cookie("", 0);
  }

  /** Ends every session of a person at once. */
  async endAllOf(personId: string): Promise<void> {
    for (const idHash of await this.repositories.sessions.removeAllOf(personId)) this.#tellRevoked(idHash);
  }

  /** Calls back with the hash of each session that is revoked; returns a function that stops it. */
  onRevoked(listener: (idHash: string) => void): () => void {
    this.#revokedListeners.add(listener);
    return () => this.#revokedListeners.delete(listener);
  }

  async #valid(idHash: string): Promise<ValidSession | null> {
    const session = await this.repositories.sessions.find(idHash);
    const now = this.options.nowMs();
    if (!session || isExpired(session, now)) return null;
    const person = await this.repositories.people.get(session.personId);
    if (!person?.active) return null;
    if (now - session.lastSeenAtMs > TOUCH_MS) await this.repositories.sessions.touch(idHash, now);
    return { idHash, person };
  }

  async #revoke(idHash: string): Promise<void> {
    await this.repositories.sessions.remove(idHash);
    this.#tellRevoked(idHash);
  }

  #tellRevoked(idHash: string): void {
    for (const listener of this.#revokedListeners) listener(idHash);
  }

  async #idHashOf(cookieHeader: string): Promise<string | null> {
    const sealed = cookieOf(cookieHeader, this.#cookieName);
    return sealed === null ? null : this.#unseal(sealed);
  }

  /** What can't be unsealed was sealed by nobody here. */
  async #unseal(sealed: string): Promise<string | null> {
    try {
      const { id } = await unsealData<{ id?: unknown }>(sealed, { password: this.options.secret, ttl: SECONDS });
      return typeof id === "string" ? hashOf(id) : null;
    } catch {
      return null;
    }
  }

  /** Browsers take the prefix only from a secure page, and let no other host set such a cookie. */
  get #cookieName(): string {
    return this.options.secureCookies ? "__Host-stepwell-session" : "stepwell-session";
  }

  #cookie(value: string, maxAgeSeconds: number): string {
    const secure = this.options.secureCookies ? "; Secure" : "";
    return `${this.#cookieName}=${value}; Path=/; HttpOnly; SameSite=Strict; Max-Age=${maxAgeSeconds}${secure}`;
  }
}

function isExpired(session: StoredSession, now: number): boolean {
  return now >= session.expiresAtMs || now - session.lastSeenAtMs >= IDLE_MS;
}

function hashOf(id: string): string {
  return createHash("sha256").update(id).digest("hex");
}

/** The value of a cookie, percent signs undone; null when it is missing or written wrongly. */
function cookieOf(header: string, name: string): string | null {
  const pair = header
    .split(";")
    .map((part) => part.trim())
    .find((part) => part.startsWith(`${name}=`));
  try {
    return pair ? decodeURIComponent(pair.slice(name.length + 1)) : null;
  } catch {
    return null;
  }
}
