/** Nothing that a second person has seen may be lost: kills, failing networks, several tabs. */
import type { Page } from "playwright/test";
import {
  connection,
  invite,
  isSaved,
  makeNotebook,
  openNotebook,
  prose,
  says,
  typeAtEnd,
} from "./notebook.ts";
import { test, expect, type Player } from "./stage.ts";

const KEYSTROKES_A_SECOND = 30;

interface Pair {
  readonly wren: Player;
  readonly otto: Player;
  readonly notebook: string;
}

async function pair(enter: (login: string) => Promise<Player>, title: string): Promise<Pair> {
  const otto = await enter("otto-lantern");
  const wren = await enter("wren-lantern");
  const notebook = await makeNotebook(wren.page, title);
  await invite(wren.page, notebook, "otto-lantern");
  await openNotebook(otto.page, notebook);
  return { wren, otto, notebook };
}

/** Numbered words: a hole or a doubled piece shows in them. */
const words = (from: number, to: number) =>
  Array.from({ length: to - from + 1 }, (_, index) => `w${from + index}`).join(" ");

/** What is written, without the carets of colleagues, which stand in the text but are no part of it. */
function textOf(page: Page): Promise<string> {
  return prose(page).evaluate((element) => {
    const copy = element.cloneNode(true) as HTMLElement; // a clone of an element is one
    for (const caret of copy.querySelectorAll(".colleague-caret")) caret.remove();
    return [...copy.children]
      .map((child) => child.textContent)
      .join("\n")
      .replaceAll("\u2060", "");
  });
}

function reads(page: Page, text: string): Promise<void> {
  return expect.poll(() => textOf(page)).toContain(text);
}

/** How far the numbered words go in a text; fails on a hole. The last word may be in the middle of being typed. */
function lastWordIn(text: string): number {
  const numbers = [...text.matchAll(/\bw(\d+)\b(?= )/g)].map(([, digits]) => Number(digits));
  expect(numbers).toEqual(numbers.map((_, index) => index + 1));
  return numbers.length;
}

test("what a colleague had seen survives a kill of the server in mid-typing, with all pages gone", async ({
  enter,
  stack,
}) => {
  test.slow();
  const { wren, otto, notebook } = await pair(enter, "Killed with all pages gone");
  await prose(wren.page).focus();
  const typing = wren.page.keyboard.type(words(1, 400), { delay: 1000 / KEYSTROKES_A_SECOND }).then(
    () => "typed to the end",
    () => "cut by the closing of the page",
  );
  // Not by `toContainText`, which trims: the word must be whole, with the space behind it.
  await expect.poll(async () => lastWordIn(await textOf(otto.page))).toBeGreaterThanOrEqual(25);
  stack.serverProcess().kill("SIGKILL");
  await says(otto.page, /^offline/);
  const seen = lastWordIn(await textOf(otto.page));
  expect(seen).toBeGreaterThanOrEqual(25);
  // Every page and its copy on the device goes before the server is back, so only the database can know.
  await wren.context.close();
  await otto.context.close();
  expect(await typing).toBe("cut by the closing of the page");
  await stack.restartServer("SIGKILL");

  const again = await enter("otto-lantern");
  await openNotebook(again.page, notebook);
  expect(lastWordIn(await textOf(again.page))).toBeGreaterThanOrEqual(seen);
});

test("a killed server is said in words, typing goes on meanwhile, and everything is there afterwards", async ({
  enter,
  stack,
}) => {
  test.slow();
  const { wren, otto, notebook } = await pair(enter, "Killed while both write");
  await typeAtEnd(otto.page, "Otto writes here. ");
  await expect(prose(wren.page)).toContainText("Otto writes here.");
  await prose(wren.page).focus();
  await wren.page.keyboard.press("Control+End");
  await wren.page.keyboard.press("Enter");
  const typing = wren.page.keyboard.type(`${words(1, 120)} `, { delay: 1000 / KEYSTROKES_A_SECOND });
  await expect(prose(otto.page)).toContainText("w12 ");
  const restart = stack.restartServer("SIGKILL");
  await says(wren.page, "offline: what you type is kept on this device and sent later");
  await says(otto.page, "offline: what you type is kept on this device and sent later");
  await prose(otto.page).focus();
  await otto.page.keyboard.press("Control+Home");
  await otto.page.keyboard.type("While it was away: ");
  await typing;
  await restart;
  for (const { page } of [wren, otto]) {
    await isSaved(page);
    await reads(page, "While it was away: Otto writes here.");
    await reads(page, "w120");
  }
  expect(await textOf(wren.page)).toBe(await textOf(otto.page));

  const fresh = await enter("wren-lantern");
  await openNotebook(fresh.page, notebook);
  await reads(fresh.page, "While it was away: Otto writes here.");
  expect(lastWordIn(await textOf(fresh.page))).toBe(120);
});

test("what is typed without a network merges on return", async ({ enter, line }) => {
  const { wren, otto } = await pair(
    (login) => enter(login, login === "otto-lantern" ? line : undefined),
    "One of them on a train",
  );
  await typeAtEnd(wren.page, "The shared sentence.");
  await expect(prose(otto.page)).toContainText("The shared sentence.");

  line.cut();
  await says(otto.page, "offline: what you type is kept on this device and sent later");
  await typeAtEnd(otto.page, " Written on the train.");
  await prose(wren.page).focus();
  await wren.page.keyboard.press("Control+Home");
  await wren.page.keyboard.type("Written at the desk. ");
  await isSaved(wren.page);
  await expect(prose(otto.page)).not.toContainText("Written at the desk.");

  line.restore();
  for (const { page } of [wren, otto]) {
    await isSaved(page);
    await reads(page, "Written at the desk. The shared sentence. Written on the train.");
  }
});

test("two tabs of one person are in step, and each goes on without the other", async ({ enter }) => {
  const wren = await enter("wren-lantern");
  const notebook = await makeNotebook(wren.page, "Two tabs");
  const second = await wren.context.newPage();
  await openNotebook(second, notebook);
  await typeAtEnd(wren.page, "From the first tab.");
  await expect(prose(second)).toContainText("From the first tab.");
  await typeAtEnd(second, " From the second.");
  await expect(prose(wren.page)).toContainText("From the first tab. From the second.");
  // One person, however many tabs.
  await expect(connection(second).getByRole("listitem")).toHaveCount(1);
  await isSaved(second);

  await wren.page.close();
  await typeAtEnd(second, " After the first was closed.");
  await isSaved(second);
  await second.reload();
  await expect(prose(second)).toContainText(
    "From the first tab. From the second. After the first was closed.",
  );
});
