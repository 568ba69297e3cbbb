import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { REFUSAL, SignInDesk, type SignInOutcome } from "@/lib/auth/sign-in";
import type { Person } from "@/lib/schemas/person";

const MINUTE_MS = 60_000;
const right = { email: "ines.marlow@thornmere.example", password: "still-water" };
const wrong = { ...right, password: "deep-water" };

let ines: Person;
let desk: SignInDesk;
/** Hashes that were compared; null for an unknown person. */
let compared: (string | null)[];

beforeEach(() => {
  vi.useFakeTimers({ toFake: ["Date", "setTimeout", "clearTimeout"] });
  ines = { id: "ines", email: right.email, name: "Ines Marlow", roles: ["technician"], active: true };
  compared = [];
  desk = new SignInDesk(
    { findByEmail: async (email) => (email === ines.email ? { person: ines, passwordHash: right.password } : null) },
    {
      verify: async (password, hash) => {
        compared.push(hash);
        return password === hash;
      },
    },
    { begin: async (personId) => `cookie of ${personId}` },
  );
});

afterEach(() => {
  vi.useRealTimers();
});

async function tryTimes(count: number, form = wrong, address = "10.0.0.1"): Promise<SignInOutcome["kind"][]> {
  const kinds: SignInOutcome["kind"][] = [];
  for (let index = 0; index < count; index += 1) kinds.push((await desk.signIn(form, address)).kind);
  return kinds;
}

const count = (kinds: readonly string[], kind: string) => kinds.filter((one) => one === kind).length;

describe("signing in", () => {
  it("begins a session for the right password", async () => {
    expect(await desk.signIn(right, "10.0.0.1")).toEqual({ kind: "signed-in", cookie: "cookie of ines" });
  });

  it("answers a wrong password, an unknown person and an inactive one in the same words", async () => {
    const answers = [await desk.signIn(wrong, "a"), await desk.signIn({ ...right, email: "nobody@x.example" }, "a")];
    ines = { ...ines, active: false };
    answers.push(await desk.signIn(right, "a"));
    expect(answers).toEqual(Array(3).fill({ kind: "refused", message: REFUSAL }));
    expect(REFUSAL).not.toMatch(/unknown|exist|inactive|locked/iu);
  });

  it("does the work of a comparison for each of them", async () => {
    await desk.signIn(wrong, "a");
    await desk.signIn({ ...right, email: "nobody@x.example" }, "a");
    expect(compared).toEqual([right.password, null]);
  });
});

describe("too many tries", () => {
  it("are slowed after five in a minute, the right password too, and nothing is compared", async () => {
    expect(await tryTimes(5)).toEqual(Array(5).fill("refused"));
    const answer = await desk.signIn(right, "10.0.0.1");
    expect(answer).toEqual({
      kind: "slowed",
      message: "Too many tries. Wait a minute, then try again.",
      retryAfterSeconds: 60,
    });
    expect(compared).toHaveLength(5);
  });

  it("wait as long as they are told, and no longer", async () => {
    await tryTimes(5);
    vi.advanceTimersByTime(40_000);
    expect(await desk.signIn(right, "10.0.0.1")).toMatchObject({ kind: "slowed", retryAfterSeconds: 20 });
    vi.advanceTimersByTime(20_000);
    expect(await tryTimes(1, right)).toEqual(["signed-in"]);
  });

  it("are ten in a quarter of an hour for one account, from however many addresses", async () => {
    const kinds: string[] = [];
    for (let minute = 0; minute < 14; minute += 1) {
      for (let address = 0; address < 50; address += 1) kinds.push(...(await tryTimes(1, wrong, `10.0.0.${address}`)));
      vi.advanceTimersByTime(MINUTE_MS);
    }
    expect(count(kinds, "refused")).toBe(10);
    expect(count(kinds, "slowed")).toBe(690);
  });

  it("never lock a person out for good", async () => {
    for (let minute = 0; minute < 60; minute += 1) {
      await tryTimes(20);
      vi.advanceTimersByTime(MINUTE_MS);
    }
    vi.advanceTimersByTime(15 * MINUTE_MS);
    expect(await tryTimes(1, right)).toEqual(["signed-in"]);
  });

  it("are forgotten once the right password came", async () => {
    expect(await tryTimes(4)).not.toContain("slowed");
    expect(await tryTimes(1, right)).toEqual(["signed-in"]);
    expect(await tryTimes(5)).toEqual(Array(5).fill("refused"));
  });

  it("on one account leave the others alone", async () => {
    await tryTimes(20);
    const other = { ...wrong, email: "ada.fenn@thornmere.example" };
    expect(await tryTimes(1, other, "10.0.0.2")).toEqual(["refused"]);
  });

  it("from one address are slowed over all accounts, and then count against none of them", async () => {
    const kinds: string[] = [];
    for (let person = 0; person < 120; person += 1) {
      kinds.push(...(await tryTimes(1, { ...wrong, email: `person-${person}@x.example` })));
    }
    expect(count(kinds, "refused")).toBe(100);
    await tryTimes(20);
    expect(await tryTimes(1, right, "10.0.0.2")).toEqual(["signed-in"]);
  });

  it("from one address do not count when the password was right", async () => {
    expect(new Set(await tryTimes(150, right))).toEqual(new Set(["signed-in"]));
  });
});
