import { expect, it } from "vitest";
import { createContactStore, STALE_AFTER_MS } from "@/lib/client/contact";

it("is in contact while the server's heart beats", () => {
  const contact = createContactStore(0);
  for (let nowMs = 1000; nowMs <= 60_000; nowMs += 1000) {
    contact.getState().heard(nowMs);
    contact.getState().check(nowMs + 999);
    expect(contact.getState().staleSinceMs).toBeNull();
  }
});

it("is old after five seconds of silence, since the time it last heard", () => {
  const contact = createContactStore(0);
  contact.getState().heard(10_000);
  contact.getState().check(10_000 + STALE_AFTER_MS);
  expect(contact.getState().staleSinceMs).toBeNull();
  contact.getState().check(10_001 + STALE_AFTER_MS);
  expect(contact.getState().staleSinceMs).toBe(10_000);
  contact.getState().check(600_000);
  expect(contact.getState().staleSinceMs).toBe(10_000);
});

it("is back at the first word from the server", () => {
  const contact = createContactStore(0);
  contact.getState().check(6000);
  contact.getState().refused("This session has ended.");
  contact.getState().heard(6500);
  expect(contact.getState()).toMatchObject({ staleSinceMs: null, refusal: null, lastHeardMs: 6500 });
});
