import { sealData } from "iron-session";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { Sessions } from "@/lib/auth/sessions";
import type { Person } from "@/lib/schemas/person";
import { NOW_MS, openTestRegister, type TestDatabase } from "../data/test-database";

const HOUR_MS = 3_600_000;
const secret = "s".repeat(32);

let opened: TestDatabase;
let sessions: Sessions;
let ines: Person;
let nowMs: number;

beforeEach(async () => {
  opened = await openTestRegister();
  nowMs = NOW_MS;
  sessions = openSessions();
  ines = (await opened.repositories.people.findByEmail("ines.marlow@thornmere.example"))!.person;
});

afterEach(() => opened.close());

function openSessions(changes: { secret?: string; secureCookies?: boolean } = {}): Sessions {
  return new Sessions(opened.repositories, { secret, secureCookies: false, nowMs: () => nowMs, ...changes });
}

/** The `Cookie` header that a browser makes of a `Set-Cookie` value. */
const cookieOf = (setCookie: string) => setCookie.split(";")[0]!;

async function begin(): Promise<string> {
  return cookieOf(await sessions.begin(ines.id));
}

describe("a session", () => {
  it("belongs to its person", async () => {
    const cookie = await begin();
    expect((await sessions.find(`theme=night; ${cookie}; x=y`))?.person).toEqual(ines);
  });

  it("is found in a cookie whose value was percent-encoded on the way", async () => {
    const [name, ...value] = (await begin()).split("=");
    expect(await sessions.find(`${name}=${encodeURIComponent(value.join("="))}`)).not.toBeNull();
  });

  it("is stored as a hash alone", async () => {
    const cookie = await begin();
    const [row] = await opened.rows<{ id_hash: string }>("SELECT * FROM sessions");
    expect(row!.id_hash).toMatch(/^[0-9a-f]{64}$/u);
    expect(cookie).not.toContain(row!.id_hash);
  });

  it("has an id of its own each time", async () => {
    await begin();
    await begin();
    const rows = await opened.rows<{ id_hash: string }>("SELECT id_hash FROM sessions");
    expect(new Set(rows.map(({ id_hash }) => id_hash)).size).toBe(2);
  });

  it("is kept from scripts and from other sites", async () => {
    expect(await sessions.begin(ines.id)).toMatch(
      /^stepwell-session=[^;]+; Path=\/; HttpOnly; SameSite=Strict; Max-Age=604800$/u,
    );
    expect(await openSessions({ secureCookies: true }).begin(ines.id)).toMatch(
      /^__Host-stepwell-session=[^;]+; Path=\/; HttpOnly; SameSite=Strict; Max-Age=604800; Secure$/u,
    );
  });

  it("of a cookie that browsers would cut off does not arise: it stays under 4 kB", async () => {
    expect((await sessions.begin(ines.id)).length).toBeLessThan(4096);
  });

  it.each([
    ["no cookie", () => ""],
    ["another cookie", () => "stepwell=1"],
    ["an empty one", () => "stepwell-session="],
    ["plain nonsense", () => "stepwell-session=hello"],
    ["a broken percent sign", () => "stepwell-session=%E0%A4%A"],
    ["a seal cut short", async () => (await begin()).slice(0, -20)],
    ["an altered seal", async () => (await begin()).replace(/.{9}(?=~2$)/u, "AAAAAAAAA")],
    ["a seal of another secret", async () => cookieOf(await openSessions({ secret: "t".repeat(32) }).begin(ines.id))],
    ["a seal around something else", async () => `stepwell-session=${await sealData({ id: 7 }, { password: secret })}`],
    [
      "a right seal around an id that nobody was given",
      async () => `stepwell-session=${await sealData({ id: "made up" }, { password: secret })}`,
    ],
  ])("is not found in %s", async (_, cookie) => {
    expect(await sessions.find(await cookie())).toBeNull();
  });

  it("of a person who may not sign in any more ends at once", async () => {
    const cookie = await begin();
    await opened.repositories.people.setActive(ines.id, false);
    expect(await sessions.find(cookie)).toBeNull();
  });
});

describe("the time of a session", () => {
  it("ends twelve hours after its last use", async () => {
    const cookie = await begin();
    nowMs += 12 * HOUR_MS;
    expect(await sessions.find(cookie)).toBeNull();
  });

  it("goes on while a run is watched, and a week at most", async () => {
    const cookie = await begin();
    const { idHash } = (await sessions.find(cookie))!;
    while (nowMs < NOW_MS + 7 * 24 * HOUR_MS - HOUR_MS) {
      nowMs += HOUR_MS;
      expect(await sessions.isValid(idHash)).toBe(true);
    }
    nowMs += HOUR_MS;
    expect(await sessions.isValid(idHash)).toBe(false);
    expect(await sessions.find(cookie)).toBeNull();
  });

  it("is over for good: its row goes when the next session begins", async () => {
    await begin();
    nowMs += 7 * 24 * HOUR_MS;
    await begin();
    expect(await opened.rows("SELECT * FROM sessions")).toHaveLength(1);
  });
});

describe("ending", () => {
  it("one session leaves the others of the person, and an old cookie is worth nothing", async () => {
    const [one, two] = [await begin(), await begin()];
    const removal = await sessions.end(one);
    expect(removal).toMatch(/^stepwell-session=; .*Max-Age=0$/u);
    expect(await sessions.find(one)).toBeNull();
    expect(await sessions.find(two)).not.toBeNull();
  });

  it("all of a person at once leaves those of others", async () => {
    const cookies = [await begin(), await begin()];
    const ada = (await opened.repositories.people.findByEmail("ada.fenn@thornmere.example"))!.person;
    const other = cookieOf(await sessions.begin(ada.id));
    await sessions.endAllOf(ines.id);
    expect(await Promise.all(cookies.map((cookie) => sessions.find(cookie)))).toEqual([null, null]);
    expect((await sessions.find(other))?.person).toEqual(ada);
  });

  it("is told to those who listen, until they stop", async () => {
    const told: string[] = [];
    const stop = sessions.onRevoked((idHash) => told.push(idHash));
    const cookies = [await begin(), await begin(), await begin()];
    const hashes = await Promise.all(cookies.map(async (cookie) => (await sessions.find(cookie))!.idHash));
    await sessions.end(cookies[0]!);
    expect(told).toEqual([hashes[0]]);
    await sessions.endAllOf(ines.id);
    expect(told.toSorted()).toEqual(hashes.toSorted());
    stop();
    await sessions.end(await begin());
    expect(told).toHaveLength(3);
  });

  it("without a session does nothing", async () => {
    expect(await sessions.end("")).toMatch(/Max-Age=0/u);
  });
});
