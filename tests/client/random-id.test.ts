import { expect, it } from "vitest";
import { z } from "zod";
import { randomId, uuidFrom } from "@/lib/client/random-id";

it("sets version and variant as in RFC 9562, appendix A.3", () => {
  // The random bits and the id of the appendix (written from memory).
  const bits = "919108f752d133205bacf847db4148a8".match(/../g)!.map((pair) => parseInt(pair, 16));
  expect(uuidFrom(Uint8Array.from(bits))).toBe("919108f7-52d1-4320-9bac-f847db4148a8");
});

it("makes valid ids without crypto.randomUUID", () => {
  const source = { getRandomValues: crypto.getRandomValues.bind(crypto) } as Crypto;
  const ids = Array.from({ length: 200 }, () => randomId(source));
  for (const id of ids) expect(z.uuid().safeParse(id).success).toBe(true);
  expect(new Set(ids).size).toBe(200);
});
