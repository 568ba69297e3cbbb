import { chromium, type Browser, type BrowserContext, type Page } from "playwright-core";
import { DEMO_PASSWORD } from "../../support/api-client";

const FLAGS = [
  "--no-sandbox",
  "--disable-gpu",
  "--disable-quic",
  "--no-first-run",
  "--disable-background-networking",
  "--disable-component-update",
  "--disable-sync",
];

export function openBrowser(): Promise<Browser> {
  return chromium.launch({ executablePath: "/usr/bin/chromium", args: FLAGS });
}

export interface Visitor {
  context: BrowserContext;
  page: Page;
  /** Errors that the page threw or logged. */
  faults: string[];
}

/** A person's browser window, not signed in. */
export async function openWindow(browser: Browser, url: string, size = { width: 1440, height: 960 }): Promise<Visitor> {
  const context = await browser.newContext({ baseURL: url, viewport: size, reducedMotion: "reduce" });
  const page = await context.newPage();
  const faults: string[] = [];
  page.on("pageerror", (error) => faults.push(error.message));
  page.on("console", (message) => {
    if (message.type() === "error") faults.push(message.text());
  });
  return { context, page, faults };
}

/** A window of a person of the demo laboratory, signed in through the form. */
export async function visitAs(
  browser: Browser,
  url: string,
  email: string,
  size?: { width: number; height: number },
): Promise<Visitor> {
  const visitor = await openWindow(browser, url, size);
  await visitor.page.goto("/sign-in");
  await visitor.page.getByLabel("E-mail").fill(email);
  await visitor.page.getByLabel("Password").fill(DEMO_PASSWORD);
  await visitor.page.getByRole("button", { name: "Sign in" }).click();
  await visitor.page.waitForURL("**/benches");
  return visitor;
}
