import { afterAll, beforeAll, expect, it } from "vitest";
import type { Browser } from "playwright-core";
import { startServer, temporaryDataFolder, type ServerProcess } from "../support/server-process";
import { openBrowser, openWindow } from "./support/browser";

let server: ServerProcess;
let browser: Browser;
const { dataFolder, remove } = temporaryDataFolder();

beforeAll(async () => {
  server = await startServer(dataFolder, { STEPWELL_DEMO: "off" });
  browser = await openBrowser();
});

afterAll(async () => {
  await browser?.close();
  await server?.kill("SIGTERM");
  remove();
});

it("an empty Stepwell asks for the site and its administrator, once", async () => {
  const { page, context, faults } = await openWindow(browser, server.url);
  await page.goto("/");
  await page.waitForURL("**/first-run");
  await page.getByLabel("Site").fill("Lowmoor Test House");
  await page.getByLabel("Your name").fill("Mara Quill");
  await page.getByLabel("E-mail").fill("mara.quill@lowmoor.example");
  await page.getByLabel("Password", { exact: true }).fill("a long enough secret");
  await page.getByRole("button").last().click();
  await page.waitForURL("**/benches");
  await page.getByText("Lowmoor Test House").first().waitFor();
  const again = await fetch(`${server.url}/api/first-run`, {
    method: "POST",
    headers: { "Content-Type": "application/json", Origin: server.url },
    body: JSON.stringify({
      siteName: "Other",
      name: "Other",
      email: "other@lowmoor.example",
      password: "a long enough secret",
    }),
  });
  expect(again.status).toBe(409);
  expect(faults).toEqual([]);
  await context.close();
});
