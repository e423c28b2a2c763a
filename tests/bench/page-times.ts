/** How long the page of a notebook with a hundred blocks takes: opening, a premise that changes, typing in its prose. */
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { chromium, type Page } from "playwright";
import { openDatabase } from "../../server/data/database.ts";
import { seedDocument } from "../../server/compute/seed-document.ts";
import { startStack } from "../../server/start/stack.mjs";
import { launchOptions } from "../../e2e/playwright.config.ts";
import { createTestDatabase } from "../server/database.ts";
import { columns, median, milliseconds } from "./figures.ts";
import { hundredBlocksDocument } from "./hundred-blocks.ts";
import { measure, read, watch, type Watched } from "./watched-page.ts";

const ROUNDS = 5;
const BLOCKS = 100;
const TYPED = "a sentence of forty letters is typed now";

export async function printPageTimes(): Promise<void> {
  const testDatabase = await createTestDatabase();
  const folder = mkdtempSync(join(tmpdir(), "subleading-page-"));
  const stack = await startStack({
    folder: join(folder, "data"),
    output: "ignore",
    env: { DATABASE_URL: testDatabase.url, NODE_ENV: "test" },
  });
  const browser = await chromium.launch(launchOptions);
  try {
    const context = await browser.newContext({ viewport: { width: 1440, height: 900 } });
    const page = await context.newPage();
    await signIn(page, stack.url);
    const notebookId = await makeNotebook(page);
    const database = openDatabase(testDatabase.url);
    await database.transaction((transaction) =>
      seedDocument(transaction, notebookId, hundredBlocksDocument()),
    );
    await database.destroy();
    // The loader of TypeScript wraps functions in a helper of its own, which a page does not have.
    await page.addInitScript({ content: "globalThis.__name = (named) => named;" });
    await page.addInitScript(watch);
    await measureNotebook(page, `${stack.url}/notebooks/${notebookId}`);
  } finally {
    await browser.close();
    await stack.stop();
    await testDatabase.drop();
    rmSync(folder, { recursive: true, force: true });
  }
}

async function measureNotebook(page: Page, address: string): Promise<void> {
  await page.goto("about:blank");
  await page.goto(address, { waitUntil: "commit" });
  await page.waitForFunction(
    (count) => document.querySelectorAll(".block:not([aria-busy])").length === count,
    BLOCKS,
    { timeout: 60_000 },
  );
  const opened = await read(page);
  // By its place and not by its label: Playwright needs ten seconds to find a label among so many.
  const heavy = page.locator('[data-place="scales/heavy/value"] input');
  await heavy.scrollIntoViewIfNeeded();
  const premise: Watched[] = [];
  for (let round = 0; round < ROUNDS; round += 1) {
    await heavy.focus();
    await heavy.selectText();
    premise.push(
      await measure(page, async () => {
        await page.keyboard.insertText(`3.${round + 1}(4) TeV`);
        await page.keyboard.press("Enter");
      }),
    );
  }
  const paragraph = page.getByText("Part 1 of an invented notebook");
  await paragraph.click();
  const typing = await measure(page, () => page.keyboard.type(TYPED, { delay: 60 }));

  console.log(`the page in Chromium, with its worker; premise changes: median of ${ROUNDS}\n`);
  const of = (read: (run: Watched) => number | null) => median(premise.map((run) => read(run) ?? 0));
  const worst = Math.max(...premise.map(({ longestTask }) => longestTask ?? 0));
  const task = (ms: number) => (ms === 0 ? "none over 50 ms" : milliseconds(ms));
  columns([
    ["a premise changes", "measured", "aim"],
    ["from the commit to the worker's last answer", milliseconds(of((run) => run.answered)), ""],
    ["from the commit to a page that is still", milliseconds(of((run) => run.still)), ""],
    ["from the request to the last answer", milliseconds(of((run) => run.inWorker)), "100 ms"],
    ["results that came", String(of((run) => run.outcomes)), ""],
    ["longest task of the main thread, median", task(of((run) => run.longestTask)), "50 ms"],
    ["longest task of the main thread, worst", task(worst), "50 ms"],
    ["tasks over 50 ms", String(of((run) => run.longTasks)), "0"],
  ]);
  console.log("");
  columns([
    [`${TYPED.length} letters in the prose`, "measured", "aim"],
    ["slowest letter, to the picture that shows it", milliseconds(typing.slowestInput ?? 16), ""],
    ["longest task of the main thread", task(typing.longestTask ?? 0), "50 ms"],
    ["requests to the worker", String(typing.requests), "0"],
  ]);
  console.log("");
  columns([
    ["the notebook is opened", "measured", "aim"],
    ["until the page is still", milliseconds(opened.still), ""],
    ["longest task of the main thread", task(opened.longestTask ?? 0), "50 ms"],
    ["tasks over 50 ms", String(opened.longTasks), "0"],
  ]);
}

async function signIn(page: Page, url: string): Promise<void> {
  await page.goto(url);
  await page
    .getByRole("link", { name: /sign in/i })
    .first()
    .click();
  await page
    .getByRole("button", { name: /^Continue as/ })
    .first()
    .click();
  await page.getByRole("heading", { name: /shelf/i }).waitFor();
}

/** Over the page's own session; the document is written before anyone opens it. */
async function makeNotebook(page: Page): Promise<string> {
  return page.evaluate(async () => {
    const me = (await (await fetch("/api/me")).json()) as { readonly csrfToken: string };
    const answer = await fetch("/api/notebooks", {
      method: "POST",
      headers: { "content-type": "application/json", "x-csrf-token": me.csrfToken },
      body: JSON.stringify({ title: "A hundred blocks", template: "blank" }),
    });
    if (!answer.ok) throw new Error(`no notebook was made: ${String(answer.status)}`);
    return ((await answer.json()) as { readonly id: string }).id;
  });
}
