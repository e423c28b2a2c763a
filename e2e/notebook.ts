/** What people do in a notebook, in the words that they see. */
import { expect, type Locator, type Page } from "playwright/test";

/** From the shelf, in the dialog; `begin` is what the dialog offers to begin with. Returns the notebook's address. */
export async function makeNotebook(page: Page, title: string, begin = "A blank page"): Promise<string> {
  await page.getByRole("button", { name: "New notebook" }).first().click();
  const dialog = page.getByRole("dialog", { name: "New notebook" });
  await dialog.getByLabel("Title").fill(title);
  await dialog.getByLabel(begin).check();
  await dialog.getByRole("button", { name: "Make the notebook" }).click();
  await page.waitForURL("**/notebooks/*");
  await isOpen(page);
  return page.url();
}

/** Opens a notebook and waits until one can write in it, or read it. */
export async function openNotebook(page: Page, address: string): Promise<void> {
  await page.goto(address);
  await isOpen(page);
}

async function isOpen(page: Page): Promise<void> {
  await expect(
    connection(page)
      .getByText(/all changes saved|reading only/)
      .first(),
  ).toBeVisible();
}

/** The owner asks someone to take part, on the sharing page, and comes back to the notebook. */
export async function invite(
  page: Page,
  notebook: string,
  to: string,
  role: "Author" | "Reviewer" | "Reader" | "Owner" = "Author",
): Promise<void> {
  await openSharing(page, notebook);
  await page.getByLabel("Account name or e-mail address").fill(to);
  await page.getByLabel("Role", { exact: true }).selectOption(role);
  await page.getByRole("button", { name: "Invite", exact: true }).click();
  await expect(page.getByText(/takes part from now on|is invited, and joins on signing in/)).toBeVisible();
  await openNotebook(page, notebook);
}

export async function openSharing(page: Page, notebook: string): Promise<void> {
  await page.goto(`${notebook}/sharing`);
  await expect(page.getByRole("heading", { name: "Sharing", level: 1 })).toBeVisible();
}

/** The header, where the state of the connection stands in words. */
export function connection(page: Page): Locator {
  return page.getByRole("banner");
}

/** The words of the connection; those that interrupt are in the page twice, once to be read aloud. */
export async function says(page: Page, words: string | RegExp): Promise<void> {
  await expect(connection(page).getByText(words).first()).toBeVisible();
}

export async function isSaved(page: Page): Promise<void> {
  await says(page, "all changes saved");
}

/** The text of the notebook as one who may write in it has it. */
export function prose(page: Page): Locator {
  return page.getByRole("textbox", { name: "Notebook text" });
}

/** The same for one who may only read. */
export function readProse(page: Page): Locator {
  return page.getByRole("document", { name: "Notebook text" });
}

/** Goes to the end of the text and types there. */
export async function typeAtEnd(page: Page, text: string, pauseMs = 0): Promise<void> {
  await prose(page).focus();
  await page.keyboard.press("Control+End");
  await page.keyboard.type(text, { delay: pauseMs });
}

export type Kind =
  | "Premises"
  | "Scaling"
  | "Divergence"
  | "Order plan"
  | "Truncation error"
  | "Counting rules"
  | "Closure"
  | "Running"
  | "Basis count"
  | "Data"
  | "Error budget";

/** The index of what can be placed, by keyboard only, from a caret in the prose. */
export async function placeByKeyboard(page: Page, name: string): Promise<void> {
  await page.keyboard.press("Control+.");
  const search = page.getByRole("combobox", { name: "Search what can be placed" });
  await expect(search).toBeFocused();
  await page.keyboard.type(name);
  const found = page.getByRole("listbox", { name: "What can be placed" }).getByRole("option");
  await expect(found.first()).toHaveAccessibleName(new RegExp(`^${name}`));
  await page.keyboard.press("Enter");
  await expect(search).toHaveCount(0);
}

/** A block by its kind, and by its title where there are several. */
export function block(page: Page, kind: Kind, title?: string): Locator {
  return page.getByRole("region", {
    name: title === undefined ? new RegExp(`^${kind}(:|$)`) : `${kind}: ${title}`,
    exact: title !== undefined,
  });
}

/** A new block of a kind after the text, with the focus in its first field. */
export async function placeAtEnd(page: Page, kind: Kind): Promise<Locator> {
  await prose(page).focus();
  await page.keyboard.press("Control+End");
  await placeByKeyboard(page, kind);
  const placed = block(page, kind).last();
  await expect(placed.getByRole("textbox").first()).toBeFocused();
  return placed;
}

/** Types into a field and leaves it, which commits it. */
export async function fillField(owner: Locator, label: string, text: string): Promise<void> {
  const field = owner.getByLabel(label, { exact: true });
  await field.fill(text);
  await field.press("Tab");
}

export async function choose(owner: Locator, label: string, option: string): Promise<void> {
  await owner.getByLabel(label, { exact: true }).selectOption(option);
}

/** Begins a row by typing in the line after the last one; the other values follow in their columns. */
export async function addRow(
  page: Page,
  owner: Locator,
  noun: string,
  first: readonly [column: string, text: string],
  others: Readonly<Record<string, string>> = {},
): Promise<void> {
  const rows = owner.getByRole("row").filter({ has: page.getByRole("button", { name: `${noun} ` }) });
  const number = (await rows.count()) + 1;
  await owner.getByLabel(`${first[0]} of a new ${noun}`, { exact: true }).focus();
  await page.keyboard.type(first[1]);
  await expect(owner.getByLabel(`${first[0]} of ${noun} ${number}`, { exact: true })).toHaveValue(first[1]);
  for (const [column, text] of Object.entries(others)) {
    const field = owner.getByLabel(`${column} of ${noun} ${number}`, { exact: true });
    if (await field.evaluate((element) => element instanceof HTMLSelectElement))
      await field.selectOption(text);
    else await field.fill(text);
  }
  await page.keyboard.press("Tab");
}

/** The address of a referee link, made on the sharing page and shown there once. */
export async function makeRefereeLink(
  page: Page,
  notebook: string,
  name: string,
  { hideAuthors = false } = {},
): Promise<string> {
  await openSharing(page, notebook);
  await page.getByLabel("Name of a new link").fill(name);
  if (hideAuthors) await page.getByLabel("Hide the authors").check();
  await page.getByRole("button", { name: "Make the link" }).click();
  const address = await page.getByLabel(`Address of “${name}”`).inputValue();
  expect(address).toMatch(/\/r\/[\w-]{20,}$/);
  return address;
}

export async function revokeRefereeLink(page: Page, notebook: string, name: string): Promise<void> {
  await openSharing(page, notebook);
  await page.getByRole("button", { name: `Revoke the link “${name}”` }).click();
  await page.getByRole("dialog").getByRole("button", { name: "Revoke the link" }).click();
  await expect(page.getByText(`“${name}” no longer opens anything.`)).toBeVisible();
}

/** From any page, by the name in its header. */
export async function goToShelf(page: Page): Promise<void> {
  await page.getByRole("link", { name: "Subleading" }).click();
  await expect(page.getByRole("heading", { name: /shelf/i })).toBeVisible();
}

/** The id in a notebook's address. */
export function idOf(notebook: string): string {
  return new URL(notebook).pathname.split("/")[2] ?? "";
}
