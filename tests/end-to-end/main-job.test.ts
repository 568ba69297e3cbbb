import { afterAll, beforeAll, describe, expect, it } from "vitest";
import type { Browser } from "playwright-core";
import { startServer, temporaryDataFolder, type ServerProcess } from "../support/server-process";
import { openBrowser, visitAs } from "./support/browser";

let server: ServerProcess;
let browser: Browser;
const { dataFolder, remove } = temporaryDataFolder();

beforeAll(async () => {
  server = await startServer(dataFolder, { STEPWELL_DEMO: "register" });
  browser = await openBrowser();
});

afterAll(async () => {
  await browser?.close();
  await server?.kill("SIGTERM");
  remove();
});

describe("the main job", () => {
  it("is started by a technician, watched by a supervisor, and replayed by a reviewer", async () => {
    const technician = await visitAs(browser, server.url, "ines.marlow@thornmere.example");
    const { page } = technician;
    await page.getByRole("link", { name: "Start a run" }).first().click();
    await page.getByRole("combobox", { name: /Unit/ }).fill("0409");
    await page.getByRole("option", { name: /TW-0409/ }).click();
    await page.getByRole("combobox", { name: /Recipe/ }).click();
    await page.getByRole("option", { name: /Full matrix/ }).click();
    for (const number of [0, 1, 2]) await page.getByRole("checkbox").nth(number).check();
    await page.getByRole("button", { name: "Start the run" }).click();
    await page.waitForURL(/\/runs\/[0-9a-f-]{36}$/u);
    const runPath = new URL(page.url()).pathname;
    await page
      .getByText(/point \d+ of 65/u)
      .first()
      .waitFor();

    const supervisor = await visitAs(browser, server.url, "ada.fenn@thornmere.example");
    await supervisor.page
      .getByText(/point \d+ of 65/u)
      .first()
      .waitFor();
    await supervisor.page.getByRole("link", { name: "Watch" }).first().click();
    await supervisor.page.waitForURL(`**${runPath}`);

    for (const watcher of [technician, supervisor]) {
      await watcher.page.getByText("The run is over.").waitFor({ timeout: 180_000 });
      expect(
        await watcher.page
          .getByRole("table", { name: /Matrix/i })
          .getByText(/settling/u)
          .count(),
      ).toBe(0);
    }

    const reviewer = await visitAs(browser, server.url, "ruth.okafor@thornmere.example");
    await reviewer.page.goto(`${runPath}/results`);
    await reviewer.page
      .getByText(/\d+ of 65 points outside/u)
      .first()
      .waitFor();
    await reviewer.page.getByRole("link", { name: "Replay" }).click();
    await reviewer.page.getByRole("button", { name: "Next outside limit" }).click();
    await reviewer.page
      .getByText(/at 50.V/u)
      .first()
      .waitFor();
    await reviewer.page.waitForURL(/at=\d+/u);
    expect(await reviewer.page.getByText(/^OUTPUT ON/u).count()).toBe(0);
    for (const { faults, context } of [technician, supervisor, reviewer]) {
      expect(faults).toEqual([]);
      await context.close();
    }
  });
});
