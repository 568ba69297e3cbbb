import { afterAll, beforeAll, expect, it } from "vitest";
import type { Browser } from "playwright-core";
import { ApiClient, eventually } from "../support/api-client";
import { startServer, temporaryDataFolder, type ServerProcess } from "../support/server-process";
import { openBrowser, visitAs } from "./support/browser";

let server: ServerProcess;
let browser: Browser;
let client: ApiClient;
const { dataFolder, remove } = temporaryDataFolder();

beforeAll(async () => {
  server = await startServer(dataFolder, { STEPWELL_DEMO: "register" });
  browser = await openBrowser();
  client = await ApiClient.signIn(server.url, "ines.marlow@thornmere.example");
});

afterAll(async () => {
  await browser?.close();
  await server?.kill("SIGTERM");
  remove();
});

async function startRun(benchId: string, clockSpeed: number): Promise<string> {
  const [unit] = await client.json<{ id: string }[]>("GET", "/api/units?search=0398");
  const recipes = await client.json<{ id: string; document: { name: string } }[]>("GET", "/api/recipes");
  const recipe = recipes.find(({ document }) => document.name === "Five-voltage accuracy")!;
  const runId = await client.startRun({ benchId, unitId: unit!.id, recipeVersionId: recipe.id }, clockSpeed);
  await eventually(async () => (await client.state(runId)).output.state === "on", 30_000, "the output is on");
  return runId;
}

it("a supervisor stops a run from the office, and every watcher sees it", async () => {
  const runId = await startRun("north", 1);
  const supervisor = await visitAs(browser, server.url, "ada.fenn@thornmere.example");
  await supervisor.page.getByRole("button", { name: "Stop" }).click();
  await eventually(async () => (await client.state(runId)).status === "stopped", 10_000, "the run is stopped");
  expect((await client.state(runId)).output.state).toBe("off");
  await supervisor.page.getByText("Free").first().waitFor();
  await supervisor.context.close();
});

it("a technician holds, resumes and stops by the keyboard", async () => {
  const runId = await startRun("window", 1);
  const { page, context, faults } = await visitAs(browser, server.url, "ines.marlow@thornmere.example");
  // Keys are heard once the page's scripts have been loaded.
  await page.goto(`/runs/${runId}`, { waitUntil: "networkidle" });
  await page.keyboard.press("h");
  await page.getByRole("button", { name: "Resume" }).waitFor();
  await page.keyboard.press("h");
  await page.getByRole("button", { name: "Hold" }).waitFor();
  await page.keyboard.press("Shift+Escape");
  await page.getByText("The run is over.").waitFor();
  expect((await client.state(runId)).status).toBe("stopped");
  expect(faults).toEqual([]);
  await context.close();
});

it("a page that was cut off says so, and is right again once it is back", async () => {
  const runId = await startRun("north", 10);
  const { page, context } = await visitAs(browser, server.url, "ada.fenn@thornmere.example");
  await page.goto(`/runs/${runId}`);
  await page
    .getByText(/point \d+ of 63/u)
    .first()
    .waitFor();
  await context.setOffline(true);
  server.child.kill("SIGSTOP");
  await page.getByText(/as of/iu).first().waitFor({ timeout: 30_000 });
  server.child.kill("SIGCONT");
  await context.setOffline(false);
  await client.command(runId, "stop");
  await page.getByText("The run is over.").waitFor({ timeout: 30_000 });
  await context.close();
});

it("two benches run side by side, one run each", async () => {
  const [north, window] = [await startRun("north", 60), await startRun("window", 60)];
  await expect(startRun("north", 60)).rejects.toThrowError(/in use/u);
  for (const runId of [north, window]) {
    const judged = async () => (await client.state(runId)).points.filter((point) => point.outcome === "judged").length;
    await eventually(async () => (await judged()) >= 3, 60_000, "three points are judged on each bench");
    await client.command(runId, "stop");
    expect((await client.state(runId)).status).toBe("stopped");
  }
});
