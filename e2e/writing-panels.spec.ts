/** The panels of the writing surface, whose code comes once the page is quiet: by keyboard and by pointer. */
import { makeNotebook, prose, typeAtEnd } from "./notebook.ts";
import { expect, test } from "./stage.ts";

test("an address becomes a link as it is typed, words become one by Control K, and the bar moves by arrows", async ({
  enter,
}) => {
  const { page } = await enter("ines-tern");
  await makeNotebook(page, "Where it was read");
  await typeAtEnd(page, "see https://example.org/a now words");
  await expect(prose(page).locator('a[href="https://example.org/a"]')).toHaveText("https://example.org/a");

  const panel = page.getByRole("dialog", { name: "Link" });
  await page.keyboard.press("Control+Shift+ArrowLeft");
  await page.keyboard.press("Control+k");
  await expect(page.getByLabel("Address")).toBeFocused();
  await page.keyboard.type("https://example.org/w");
  await page.keyboard.press("Enter");
  await expect(panel).toHaveCount(0);
  await expect(prose(page)).toBeFocused();
  await expect(prose(page).locator('a[href="https://example.org/w"]')).toHaveText("words");

  const button = page.getByRole("button", { name: "Link", exact: true });
  await button.click();
  await expect(panel).toBeVisible();
  await button.click();
  await expect(panel).toHaveCount(0);

  await page.getByRole("button", { name: "Bold" }).focus();
  await page.keyboard.press("ArrowRight");
  await expect(page.getByRole("button", { name: "Italic" })).toBeFocused();
});

test("the index opens and closes at its tick, and leads to the numbers that can be pinned", async ({
  enter,
}) => {
  const { page } = await enter("ines-tern");
  await makeNotebook(page, "Lantern again", "A copy of the Lantern demonstration");
  await prose(page).focus();
  await page.keyboard.press("Control+End");
  const tick = page.getByRole("button", { name: "Place something here" });
  const search = page.getByRole("combobox", { name: "Search what can be placed" });
  await tick.click();
  await expect(search).toBeFocused();
  await tick.click();
  await expect(search).toHaveCount(0);

  await page.keyboard.press("Control+.");
  await expect(search).toBeFocused();
  await page.keyboard.type("Pin");
  await page.keyboard.press("Enter");
  await expect(page.getByRole("dialog", { name: "Pin a number into the prose" })).toBeVisible();
  await page.keyboard.press("Escape");
  await expect(page.getByRole("dialog")).toHaveCount(0);
});
