import { RateLimiterMemory, type RateLimiterRes } from "rate-limiter-flexible";
import type { Repositories } from "@/lib/data/repositories";
import type { SignIn } from "@/lib/schemas/person";
import type { Passwords } from "./passwords";
import type { Sessions } from "./sessions";

const WINDOW_SECONDS = 15 * 60;
const FREE_TRIES_PER_ACCOUNT = 10;
const FREE_TRIES_PER_ADDRESS = 100;

/** The same words for a wrong password, an unknown address and a person who may not sign in any more. */
export const REFUSAL = "E-mail and password do not match. Check both and try again.";

export type SignInOutcome =
  | { kind: "signed-in"; cookie: string }
  | { kind: "refused"; message: string }
  | { kind: "slowed"; message: string; retryAfterSeconds: number };

/** Checks passwords with one neutral answer, slowed down per account and per address after a few wrong tries. Nobody is locked out for good. */
export class SignInDesk {
  readonly #account = new RateLimiterMemory({ points: FREE_TRIES_PER_ACCOUNT, duration: WINDOW_SECONDS });
  readonly #address = new RateLimiterMemory({ points: FREE_TRIES_PER_ADDRESS, duration: WINDOW_SECONDS });

  constructor(
    private readonly people: Repositories["people"],
    private readonly passwords: Passwords,
    private readonly sessions: Sessions,
  ) {}

  async signIn({ email, password }: SignIn, address: string): Promise<SignInOutcome> {
    const slowedSeconds = await this.#take(email, address);
    if (slowedSeconds !== null) return slowed(slowedSeconds);
    const found = await this.people.findByEmail(email);
    const isMatch = await this.passwords.verify(password, found?.passwordHash ?? null);
    if (!found || !isMatch || !found.person.active) return { kind: "refused", message: REFUSAL };
    await this.#account.delete(email);
    return { kind: "signed-in", cookie: await this.sessions.begin(found.person.id) };
  }

  /** Counts this try; seconds to wait when there were too many. */
  async #take(email: string, address: string): Promise<number | null> {
    try {
      await this.#account.consume(email);
      await this.#address.consume(address);
      return null;
    } catch (refusal) {
      if (refusal instanceof Error) throw refusal;
      return Math.ceil((refusal as RateLimiterRes).msBeforeNext / 1000);
    }
  }
}

function slowed(retryAfterSeconds: number): SignInOutcome {
  const minutes = Math.ceil(retryAfterSeconds / 60);
  const wait = minutes === 1 ? "a minute" : `${minutes} minutes`;
  return { kind: "slowed", message: `Too many tries. Wait ${wait}, then try again.`, retryAfterSeconds };
}
