import { describe, expect, it } from "vitest";
import { demoAccounts, DEMO_PASSWORD } from "@/components/auth/demo-accounts";
import { entranceFailure } from "@/components/auth/entrance";
import { ApiError, noAnswer } from "@/lib/client/api-error";
import { DEMO_PASSWORD as LAID_PASSWORD, demoPeople } from "@/lib/data/demo/demo-people";

describe("the demo laboratory on the sign-in page", () => {
  it("names the password that the laboratory was laid with", () => expect(DEMO_PASSWORD).toBe(LAID_PASSWORD));

  it("names everyone's role and short name", () => {
    const people = demoPeople.toReversed().map((person, index) => ({ ...person, id: String(index) }));
    expect(demoAccounts(people).map(({ role, shortName }) => `${role} ${shortName}`)).toEqual([
      "technician ines.marlow",
      "engineer tomas.reyl",
      "supervisor ada.fenn",
      "reviewer ruth.okafor",
      "administrator sam.idris",
    ]);
    expect(demoAccounts(people.map((person) => ({ ...person, active: false })))).toEqual([]);
  });
});

describe("why a person is not let in", () => {
  it("says when the server can't be reached", () =>
    expect(entranceFailure(noAnswer(new TypeError("fetch failed")))).toMatch(/^The server can’t be reached\./u));

  it("passes on the server's own words", () => {
    const refused = new ApiError("Too many tries. Wait 15 minutes, then try again.", { status: 429, code: "too-many" });
    expect(entranceFailure(refused)).toBe("Too many tries. Wait 15 minutes, then try again.");
  });
});
