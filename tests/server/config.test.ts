import { describe, expect, it } from "vitest";
import { readConfig } from "@/lib/server/config";

describe("the settings", () => {
  it("serves the demo laboratory on this machine alone when nothing is set", () => {
    expect(readConfig({ NODE_ENV: "production" })).toMatchObject({
      port: 3000,
      host: "127.0.0.1",
      demo: "on",
      isDevelopment: false,
    });
  });

  it("names every fault in one message", () => {
    const faulty = {
      NODE_ENV: "production" as const,
      PORT: "eighty",
      STEPWELL_DEMO: "maybe",
      STEPWELL_SESSION_SECRET: "short",
    };
    expect(() => readConfig(faulty)).toThrowError(/PORT[\s\S]*STEPWELL_DEMO[\s\S]*STEPWELL_SESSION_SECRET/u);
  });

  it("adds host names to those of this machine", () => {
    const { allowedHosts } = readConfig({
      NODE_ENV: "production",
      STEPWELL_ALLOWED_HOSTS: "Bench.example, office.example",
    });
    expect(allowedHosts).toEqual(["localhost", "127.0.0.1", "[::1]", "bench.example", "office.example"]);
  });
});
