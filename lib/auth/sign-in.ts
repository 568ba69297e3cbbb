import { RateLimiterMemory, type RateLimiterRes } from "rate-limiter-flexible";
import type { Repositories } from "@/lib/data/repositories";
import type { SignIn } from "@/lib/schemas/person";
import type { Passwords } from "./passwords";
import type { Sessions } from "./sessions";

/** Tries that are answered at once: a burst, then what a quarter of an hour allows to an account and to an address. */
const BURST = { points: 5, duration: 60 };
const PER_ACCOUNT = { points: 10, duration: 15 * 60 };
const PER_ADDRESS = { points: 100, duration: 15 * 60 };

/** The same words for a wrong password, an unknown address and a person who may not sign in any more. */
export const REFUSAL = "E-mail and password do not match. Check both and try again.";

export type SignInOutcome =
  | { kind: "signed-in"; cookie: string }
  | { kind: "refused"; message: string }
  | { kind: "slowed"; message: string; retryAfterSeconds: number };

/** Checks passwords with one neutral answer, slowed down per account and per address after a few tries. Nobody is locked out for good. */
export class SignInDesk {
  readonly #burst = new RateLimiterMemory(BURST);
  readonly #account = new RateLimiterMemory(PER_ACCOUNT);
  readonly #address = new RateLimiterMemory(PER_ADDRESS);

  constructor(
    private readonly people: Pick<Repositories["people"], "findByEmail">,
    private readonly passwords: Pick<Passwords, "verify">,
    private readonly sessions: Pick<Sessions, "begin">,
  ) {}

  async signIn({ email, password }: SignIn, address: string): Promise<SignInOutcome> {
    const slowedMs = await this.#take(email, address);
    if (slowedMs !== null) return slowed(Math.ceil(slowedMs / 1000));
    const found = await this.people.findByEmail(email);
    const isMatch = await this.passwords.verify(password, found?.passwordHash ?? null);
    if (!found || !isMatch || !found.person.active) return { kind: "refused", message: REFUSAL };
    await this.#giveBack(email, address);
    return { kind: "signed-in", cookie: await this.sessions.begin(found.person.id) };
  }

  /** Counts this try; milliseconds to wait when there were too many. A slowed address can't slow an account any further. */
  async #take(email: string, address: string): Promise<number | null> {
    return (
      (await waitOf(this.#address, address)) ??
      (await waitOf(this.#burst, email)) ??
      (await waitOf(this.#account, email))
    );
  }

  async #giveBack(email: string, address: string): Promise<void> {
    await Promise.all([this.#burst.delete(email), this.#account.delete(email), this.#address.reward(address)]);
  }
}

async function waitOf(limiter: RateLimiterMemory, key: string): Promise<number | null> {
  try {
    await limiter.consume(key);
    return null;
  } catch (refusal) {
    if (refusal instanceof Error) throw refusal;
    return (refusal as RateLimiterRes).msBeforeNext;
  }
}

function slowed(retryAfterSeconds: number): SignInOutcome {
  const minutes = Math.ceil(retryAfterSeconds / 60);
  const wait = minutes === 1 ? "a minute" : `${minutes} minutes`;
  return { kind: "slowed", message: `Too many tries. Wait ${wait}, then try again.`, retryAfterSeconds };
}
