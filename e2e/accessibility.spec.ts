/** Every screen, in both themes, wide and narrow: nothing serious for assistive technology, nothing off the side. */
import { expectSound, lookOver } from "./axe.ts";
import {
  block,
  fillField,
  makeNotebook,
  makeRefereeLink,
  openSharing,
  prose,
  readProse,
  revokeRefereeLink,
} from "./notebook.ts";
import { test, expect } from "./stage.ts";

const LANTERN = "A copy of the Lantern demonstration";

test("the screens of someone who is not signed in", async ({ visit, stack }) => {
  test.slow();
  const page = await visit();
  const found: string[] = [];
  await page.goto(stack.url);
  await page.getByRole("heading", { name: "Try it here" }).scrollIntoViewIfNeeded();
  await expect(block(page, "Scaling").getByRole("table").first()).toBeVisible();
  found.push(...(await lookOver(page, "first page")));
  await page.goto(`${stack.url}/shelf`);
  await expect(page.getByRole("heading", { name: "Sign in to open this page" })).toBeVisible();
  found.push(...(await lookOver(page, "sign-in")));
  await page.goto(`${stack.url}/nowhere`);
  await expect(page.getByRole("heading", { name: "There is nothing at this address" })).toBeVisible();
  found.push(...(await lookOver(page, "not found")));
  expectSound(found);
});

test("the screens of someone who writes", async ({ enter }) => {
  test.slow();
  const { page } = await enter("wren-lantern");
  const found: string[] = [];
  const notebook = await makeNotebook(page, "Looked over", LANTERN);
  await fillField(block(page, "Premises"), "value of scale 1", "2.5(3) TeV");
  await expect(
    prose(page)
      .getByRole("button", { name: /it has moved to/ })
      .first(),
  ).toBeVisible();
  await expect(page.getByRole("banner").getByRole("button", { name: /^pins?: \d moved/ })).toBeVisible();
  await expect(block(page, "Truncation error").getByRole("table").nth(1)).toBeVisible();
  found.push(...(await lookOver(page, "notebook with moved pins")));

  await prose(page).focus();
  await page.keyboard.press("Control+End");
  await page.keyboard.press("Control+.");
  await expect(page.getByRole("listbox", { name: "What can be placed" })).toBeVisible();
  found.push(...(await lookOver(page, "index of what can be placed")));
  await page.keyboard.press("Escape");

  await openSharing(page, notebook);
  await page.getByLabel("Account name or e-mail address").fill("someone-invented@example.org");
  await page.getByRole("button", { name: "Invite", exact: true }).click();
  await expect(page.getByRole("region", { name: "Waiting" })).toBeVisible();
  await page.getByLabel("Name of a new link").fill("journal");
  await page.getByRole("button", { name: "Make the link" }).click();
  await expect(page.getByLabel("Address of “journal”")).toBeVisible();
  found.push(...(await lookOver(page, "sharing")));

  await page.getByRole("link", { name: "Subleading" }).click();
  await expect(page.getByRole("row", { name: "Looked over" })).toBeVisible();
  found.push(...(await lookOver(page, "shelf")));
  await page.getByRole("button", { name: "New notebook" }).first().click();
  await expect(page.getByRole("dialog", { name: "New notebook" })).toBeVisible();
  found.push(...(await lookOver(page, "new notebook")));
  expectSound(found);
});

test("the screens of a referee", async ({ enter, visit }) => {
  test.slow();
  const { page: owner } = await enter("wren-lantern");
  const notebook = await makeNotebook(owner, "Looked over by a referee", LANTERN);
  const address = await makeRefereeLink(owner, notebook, "journal");
  const found: string[] = [];
  const referee = await visit();
  await referee.goto(address);
  await expect(readProse(referee)).toContainText("Below the threshold");
  await expect(referee.getByRole("region", { name: "Check sheet" })).toContainText("0.109");
  found.push(...(await lookOver(referee, "referee page and check sheet")));
  await revokeRefereeLink(owner, notebook, "journal");
  await expect(referee.getByRole("heading", { name: "This link opens nothing" })).toBeVisible();
  found.push(...(await lookOver(referee, "revoked link")));
  expectSound(found);
});
