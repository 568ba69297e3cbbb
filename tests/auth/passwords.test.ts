import { execFile } from "node:child_process";
import { fileURLToPath } from "node:url";
import { promisify } from "node:util";
import bcrypt from "bcryptjs";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { Passwords } from "@/lib/auth/passwords";

let passwords: Passwords;

beforeEach(() => {
  passwords = new Passwords();
});

afterEach(() => passwords.close());

describe("a password", () => {
  it("is kept as a bcrypt hash of cost 12, a new one each time", async () => {
    const [one, two] = await Promise.all([passwords.hash("still-water"), passwords.hash("still-water")]);
    expect(one).toMatch(/^\$2[aby]\$12\$.{53}$/u);
    expect(two).not.toBe(one);
    expect(await bcrypt.compare("still-water", one)).toBe(true);
  });

  it("is known again, and no other is", async () => {
    const hash = await passwords.hash("still-water");
    expect(await passwords.verify("still-water", hash)).toBe(true);
    expect(await passwords.verify("Still-water", hash)).toBe(false);
    expect(await passwords.verify("", hash)).toBe(false);
  });

  it("of nobody is wrong, whatever it is", async () => {
    expect(await passwords.verify("still-water", null)).toBe(false);
    expect(await passwords.verify("", null)).toBe(false);
  });

  // bcrypt reads 72 bytes: a longer password would be cut in silence.
  it.each([
    ["73 letters", "a".repeat(73)],
    ["19 signs of four bytes", "\u{1F600}".repeat(19)],
  ])("of %s is refused", async (_, long) => {
    await expect(passwords.hash(long)).rejects.toThrow(RangeError);
    const hashOfCut = await bcrypt.hash(Buffer.from(long).subarray(0, 72).toString(), 4);
    expect(await passwords.verify(long, hashOfCut)).toBe(false);
  });

  it("of 72 bytes is taken whole", async () => {
    const longest = "a".repeat(71);
    const hash = await passwords.hash(`${longest}b`);
    expect(await passwords.verify(`${longest}c`, hash)).toBe(false);
    expect(await passwords.verify(`${longest}b`, hash)).toBe(true);
  });
});

describe("the thread that hashes", () => {
  it("leaves the loop to others meanwhile", async () => {
    let turns = 0;
    const timer = setInterval(() => (turns += 1), 1);
    await Promise.all(Array.from({ length: 4 }, () => passwords.hash("still-water")));
    clearInterval(timer);
    expect(turns).toBeGreaterThan(20);
  });

  it("tells of a hash that it can't read and answers the next question", async () => {
    const broken = `$9x$12$${"x".repeat(53)}`;
    await expect(passwords.verify("still-water", broken)).rejects.toThrow(/could not be checked/u);
    expect(await passwords.verify("a", await bcrypt.hash("a", 4))).toBe(true);
  });

  it("fails those who wait when it is stopped, and those who ask afterwards", async () => {
    const waiting = passwords.hash("still-water");
    const failed = expect(waiting).rejects.toThrow(/has ended/u);
    await passwords.close();
    await failed;
    await expect(passwords.hash("still-water")).rejects.toThrow(/is stopping/u);
  });

  it("works without a build step, keeps the process alive while asked and lets it end afterwards", async () => {
    const script = `
      import { Passwords } from "@/lib/auth/passwords";
      const passwords = new Passwords();
      console.log(await passwords.verify("a", await passwords.hash("a")));`;
    const cwd = fileURLToPath(new URL("../..", import.meta.url));
    const options = ["--import", "tsx", "--input-type=module", "--eval", script];
    const { stdout } = await promisify(execFile)(process.execPath, options, { cwd });
    expect(stdout.trim()).toBe("true");
  });
});
