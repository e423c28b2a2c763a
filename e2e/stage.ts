/** The stage every story plays on: a whole Subleading of its own, and people who can sign in to it. */
import { mkdtempSync, chmodSync, rmSync } from "node:fs";
import { join } from "node:path";
import { test as base, type Browser, type BrowserContext, type Page } from "playwright/test";
import { startStack, type Stack } from "../server/start/stack.mjs";
import { layLine, type Line } from "./line.ts";

export interface Player {
  readonly login: string;
  readonly page: Page;
  readonly context: BrowserContext;
}

interface Fixtures {
  /** Opens a browser of its own for someone and signs them in; on a line of their own when they need one to be cut. */
  readonly enter: (login: string, line?: Line) => Promise<Player>;
  /** A browser of its own for someone who is not signed in. */
  readonly visit: (line?: Line) => Promise<Page>;
  /** A way to the server that can be cut. */
  readonly line: Line;
}
interface Stage {
  readonly stack: Stack;
}

export const test = base.extend<Fixtures, Stage>({
  stack: [
    // Playwright reads the fixture's dependencies from this pattern, empty or not.
    // eslint-disable-next-line no-empty-pattern
    async ({}, use) => {
      const folder = mkdtempSync("/var/tmp/subleading-e2e-");
      chmodSync(folder, 0o711);
      const quiet = process.env["E2E_LOG"] === undefined;
      const stack = await startStack({
        folder: join(folder, "data"),
        testing: true,
        output: quiet ? "ignore" : "inherit",
      });
      await use(stack);
      await stack.stop();
      rmSync(folder, { recursive: true, force: true });
    },
    { scope: "worker", timeout: 120_000 },
  ],
  visit: async ({ browser }, use) => {
    const contexts: BrowserContext[] = [];
    await use(async (line) => {
      const context = await newContext(browser, line);
      contexts.push(context);
      return context.newPage();
    });
    for (const context of contexts) await context.close();
  },
  // Playwright reads the fixture's dependencies from this pattern, empty or not.
  // eslint-disable-next-line no-empty-pattern
  line: async ({}, use) => {
    const line = await layLine();
    await use(line);
    await line.remove();
  },
  enter: async ({ visit, stack }, use) => {
    await use(async (login, line) => {
      const page = await visit(line);
      await signIn(page, stack.url, login);
      return { login, page, context: page.context() };
    });
  },
});

function newContext(browser: Browser, line?: Line): Promise<BrowserContext> {
  return browser.newContext({
    viewport: { width: 1440, height: 900 },
    reducedMotion: "reduce",
    // By itself Chromium goes past a proxy to its own machine.
    ...(line ? { proxy: { server: line.address, bypass: "<-loopback>" } } : {}),
  });
}

/** Through the real sign-in: the start page, the stand-in's consent page, and back to the shelf. */
export async function signIn(page: Page, url: string, login: string): Promise<void> {
  await page.goto(url);
  await page
    .getByRole("link", { name: /sign in/i })
    .first()
    .click();
  await page.getByRole("button", { name: `Continue as ${login}` }).click();
  await page.waitForURL(`${url}/**`);
  await page.getByRole("heading", { name: /shelf/i }).waitFor();
}

export { expect } from "playwright/test";
