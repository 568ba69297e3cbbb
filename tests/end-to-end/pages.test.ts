import AxeBuilder from "@axe-core/playwright";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { Browser, Page } from "playwright-core";
import { ApiClient, eventually } from "../support/api-client";
import { startServer, temporaryDataFolder, type ServerProcess } from "../support/server-process";
import { openBrowser, openWindow, visitAs } from "./support/browser";

let server: ServerProcess;
let browser: Browser;
let runId: string;
const { dataFolder, remove } = temporaryDataFolder();

async function finishQuickRun(client: ApiClient): Promise<string> {
  const [bench] = await client.json<{ id: string }[]>("GET", "/api/benches");
  const [unit] = await client.json<{ id: string }[]>("GET", "/api/units?search=0421");
  const recipes = await client.json<{ id: string; document: { name: string } }[]>("GET", "/api/recipes");
  const recipeVersionId = recipes.find(({ document }) => document.name === "Quick check")!.id;
  const id = await client.startRun({ benchId: bench!.id, unitId: unit!.id, recipeVersionId }, 500);
  await eventually(async () => (await client.state(id)).status === "finished", 60_000, "the quick check finishes");
  return id;
}

beforeAll(async () => {
  server = await startServer(dataFolder, { STEPWELL_DEMO: "register" });
  browser = await openBrowser();
  runId = await finishQuickRun(await ApiClient.signIn(server.url, "ines.marlow@thornmere.example"));
});

afterAll(async () => {
  await browser?.close();
  await server?.kill("SIGTERM");
  remove();
});

async function seriousFaults(page: Page): Promise<string[]> {
  const { violations } = await new AxeBuilder({ page }).analyze();
  return violations
    .filter(({ impact }) => impact === "serious" || impact === "critical")
    .map(({ id, nodes }) => `${id}: ${nodes[0]?.html ?? ""}`);
}

describe("every page", () => {
  it.each(["day", "night"])("can be used by everyone in the %s theme", async (theme) => {
    const { page, context, faults } = await visitAs(browser, server.url, "tomas.reyl@thornmere.example");
    await context.addCookies([{ name: "stepwell-theme", value: theme, url: server.url }]);
    const paths = [
      "/benches",
      "/benches/north/start",
      "/runs",
      `/runs/${runId}/results`,
      `/runs/${runId}/replay`,
      `/runs/${runId}/journal`,
      "/recipes",
      "/recipes/new",
    ];
    for (const path of paths) {
      await page.goto(path);
      await page.getByRole("heading", { level: 1 }).waitFor();
      expect(await seriousFaults(page), path).toEqual([]);
    }
    expect(faults).toEqual([]);
    await context.close();
  });

  it("fits a phone without scrolling sideways", async () => {
    const { page, context } = await visitAs(browser, server.url, "ada.fenn@thornmere.example", {
      width: 390,
      height: 844,
    });
    for (const path of ["/benches", "/runs", `/runs/${runId}/results`, `/runs/${runId}/replay`, "/recipes"]) {
      await page.goto(path);
      await page.getByRole("heading", { level: 1 }).waitFor();
      const overflow = await page.evaluate(
        () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
      );
      expect(overflow, path).toBeLessThanOrEqual(0);
    }
    await context.close();
  });

  it("shows nothing but sign-in without a session, and returns there after it", async () => {
    const { page, context } = await openWindow(browser, server.url);
    await page.goto(`/runs/${runId}/results`);
    await page.waitForURL(/\/sign-in\?next=/u);
    await page.getByLabel("E-mail").fill("ruth.okafor@thornmere.example");
    await page.getByLabel("Password").fill("wrong-password");
    await page.getByRole("button", { name: "Sign in" }).click();
    await page.getByText(/do not match/u).waitFor();
    await page.getByLabel("Password").fill("still-water");
    await page.getByRole("button", { name: "Sign in" }).click();
    await page.waitForURL(`**/runs/${runId}/results`);
    await context.close();
  });
});

describe("a session", () => {
  it("ends everywhere at once on sign-out: requests and the socket", async () => {
    const client = await ApiClient.signIn(server.url, "ada.fenn@thornmere.example");
    const socket = client.follow(runId, 0, () => undefined);
    await eventually(async () => socket.connected, 5000, "the socket connects");
    await client.request("DELETE", "/api/session");
    await eventually(async () => !socket.connected, 5000, "the socket is cut");
    expect((await client.request("GET", "/api/benches")).status).toBe(401);
  });

  it("may not do what its role does not allow", async () => {
    const reviewer = await ApiClient.signIn(server.url, "ruth.okafor@thornmere.example");
    expect((await reviewer.request("POST", "/api/preflight", {})).status).toBe(403);
    expect((await reviewer.request("POST", "/api/recipes", {})).status).toBe(403);
    const foreign = await fetch(`${server.url}/api/preflight`, {
      method: "POST",
      headers: { Cookie: reviewer.cookie, Origin: "http://elsewhere.example", "Content-Type": "application/json" },
      body: "{}",
    });
    expect(foreign.status).toBe(403);
  });
});

describe("a recipe that can't be run", () => {
  it("is refused at its fields and not stored", async () => {
    const engineer = await ApiClient.signIn(server.url, "tomas.reyl@thornmere.example");
    const before = (await engineer.json<unknown[]>("GET", "/api/recipes")).length;
    const section = {
      kind: "resistance",
      nominalOhms: [7e14],
      testVolts: [123],
      excluded: [],
      settling: { kind: "fixed", waitSeconds: 1 },
      readingsPerPoint: 1,
      order: "by-voltage",
    };
    const document = { name: "Too much", purpose: "", sections: [section], decisionRule: { kind: "simple" } };
    const response = await engineer.request("POST", "/api/recipes", {
      document,
      modelIds: ["pellham-ir-10"],
      release: false,
    });
    const { problems } = (await response.json()) as { problems: { path: unknown[]; message: string }[] };
    expect(response.status).toBe(422);
    expect(problems.map(({ path }) => path[3])).toEqual(["nominalOhms", "testVolts"]);
    expect(await engineer.json<unknown[]>("GET", "/api/recipes")).toHaveLength(before);
  });
});
