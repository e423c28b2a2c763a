/** The main job with the keyboard alone: from the shelf to a referee link, no pointer. */
import type { Locator, Page } from "playwright/test";
import { block, isSaved, openNotebook, placeByKeyboard, prose } from "./notebook.ts";
import { test, expect } from "./stage.ts";

test("a notebook is made, computed, pinned, changed and sent with the keyboard alone", async ({ enter }) => {
  test.slow();
  const { page } = await enter("wren-lantern");
  await tabTo(page, page.getByRole("button", { name: "New notebook" }).first());
  await page.keyboard.press("Enter");
  await tabTo(page, page.getByRole("dialog", { name: "New notebook" }).getByLabel("Title"));
  await page.keyboard.type("By keyboard");
  await page.keyboard.press("Enter");
  await page.waitForURL("**/notebooks/*");
  const notebook = page.url();
  // A blank page waits for its first words.
  await expect(prose(page)).toBeFocused();
  await page.keyboard.type("Written without a mouse.");
  const premises = block(page, "Premises");

  await test.step("a theory is stated", async () => {
    await placeByKeyboard(page, "Premises");
    await expect(premises.getByLabel("name of the theory")).toBeFocused();
    await page.keyboard.type("Lantern");
    await typeRow(page, premises, "symbol of a new field", ["chi"]);
    await typeRow(page, premises, "symbol of a new scale", ["Lambda", "3.2(4) TeV", "heavy"]);
    await typeRow(page, premises, "symbol of a new scale", ["p", "350 GeV", "probe"]);
    await typeRow(page, premises, "term, as typed of a new term", ["c_6/Lambda^2 chi^6"]);
    // Leaving the field keeps what was typed; Escape in it would take the row back.
    await page.keyboard.press("Tab");
    await page.keyboard.press("Escape");
    await page.keyboard.press("Escape");
  });

  await test.step("Escape leaves the block, arrow keys go past it, Enter goes back into it", async () => {
    await expect(prose(page)).toBeFocused();
    await page.keyboard.press("ArrowDown");
    await page.keyboard.type("After the block, Q is ");
    await expect(prose(page).getByText("After the block, Q is")).toBeVisible();
    await page.keyboard.press("Home");
    await page.keyboard.press("ArrowUp");
    await page.keyboard.press("Enter");
    await expect(premises.locator(":focus")).toHaveCount(1);
    await page.keyboard.press("Escape");
    await page.keyboard.press("Escape");
  });

  await test.step("it is counted, and a number is pinned", async () => {
    await page.keyboard.press("Control+End");
    await placeByKeyboard(page, "Scaling");
    await expect(block(page, "Scaling").getByRole("table").first()).toContainText("irrelevant");
    await page.keyboard.press("Escape");
    await page.keyboard.press("Escape");
    await page.keyboard.press("ArrowUp");
    await page.keyboard.press("End");
    await page.keyboard.press("Control+Shift+.");
    await expect(page.getByRole("dialog", { name: "Pin a number into the prose" })).toBeVisible();
    await page.keyboard.type("Scaling Q");
    await page.keyboard.press("Enter");
    await expect(prose(page).getByRole("button", { name: /0\.109.*, pinned: .*it holds/ })).toBeVisible();
  });

  await test.step("a premise changes; the pin that moved is found and accepted", async () => {
    await tabTo(page, premises.getByLabel("value of scale 1", { exact: true }), "Shift+Tab");
    await page.keyboard.press("Control+a");
    await page.keyboard.type("2.5(3) TeV");
    await expect(prose(page).getByRole("button", { name: /it has moved to 0\.14/ })).toBeVisible();
    await tabTo(page, page.getByRole("banner").getByRole("button", { name: "pin: 1 moved" }), "Shift+Tab");
    await page.keyboard.press("Enter");
    await expect(prose(page)).toBeFocused();
    await page.keyboard.press("Enter");
    await expect(prose(page).getByRole("button", { name: /0\.14.*, pinned: .*it holds/ })).toBeVisible();
    await isSaved(page);
  });

  await test.step("a referee link is made", async () => {
    await tabTo(page, page.getByRole("link", { name: "Sharing" }), "Shift+Tab");
    await page.keyboard.press("Enter");
    await expect(page.getByRole("heading", { name: "Sharing", level: 1 })).toBeVisible();
    await tabTo(page, page.getByLabel("Name of a new link"));
    await page.keyboard.type("journal");
    await page.keyboard.press("Enter");
    await expect(page.getByLabel("Address of “journal”")).toHaveValue(/\/r\/[\w-]{20,}$/);
  });

  await openNotebook(page, notebook);
  await expect(prose(page)).toContainText("Written without a mouse.");
  await expect(premises.getByLabel("name of the theory")).toHaveValue("Lantern");
  await expect(premises.getByLabel("value of scale 1", { exact: true })).toHaveValue("2.5(3) TeV");
});

/** Begins a row in the line after the last one; Tab goes on to each further value. */
async function typeRow(page: Page, owner: Locator, first: string, values: readonly string[]): Promise<void> {
  await tabTo(page, owner.getByLabel(first, { exact: true }));
  for (const [index, value] of values.entries()) {
    if (index > 0) await page.keyboard.press("Tab");
    await page.keyboard.type(value);
  }
}

/** Presses Tab until the focus is there, as often as a patient person would. */
async function tabTo(page: Page, target: Locator, key: "Tab" | "Shift+Tab" = "Tab"): Promise<void> {
  const MOST_PRESSES = 80;
  for (let presses = 0; presses <= MOST_PRESSES; presses += 1) {
    if (await target.evaluate((element) => element === document.activeElement)) return;
    await page.keyboard.press(key);
  }
  throw new Error(`the focus did not reach ${String(target)} within ${MOST_PRESSES} presses of ${key}`);
}
