/** Undo is each person's own, the same in prose and in blocks, and never takes a colleague's work. */
import type { Locator, Page } from "playwright/test";
import {
  addRow,
  block,
  fillField,
  invite,
  isSaved,
  makeNotebook,
  openNotebook,
  placeAtEnd,
  prose,
  typeAtEnd,
} from "./notebook.ts";
import { test, expect, type Player } from "./stage.ts";

const UNDO = "Control+z";
const REDO = "Control+Shift+z";
const OVERWRITTEN =
  "A colleague has changed this since, so your last change was not undone. It has left your history; earlier ones are untouched.";

async function pair(enter: (login: string) => Promise<Player>, title: string): Promise<[Page, Page]> {
  const otto = await enter("otto-lantern");
  const wren = await enter("wren-lantern");
  const notebook = await makeNotebook(wren.page, title);
  await invite(wren.page, notebook, "otto-lantern");
  await openNotebook(otto.page, notebook);
  return [wren.page, otto.page];
}

async function placeLantern(page: Page): Promise<Locator> {
  const premises = await placeAtEnd(page, "Premises");
  await fillField(premises, "name of the theory", "Lantern");
  await addRow(page, premises, "field", ["symbol", "chi"]);
  await addRow(page, premises, "scale", ["symbol", "Lambda"], { value: "3.2(4) TeV", role: "heavy" });
  await addRow(page, premises, "scale", ["symbol", "p"], { value: "350 GeV", role: "probe" });
  await addRow(page, premises, "term", ["term, as typed", "c_6/Lambda^2 chi^6"]);
  await isSaved(page);
  return premises;
}

const field = (page: Page, label: string) => block(page, "Premises").getByLabel(label, { exact: true });

test("in prose, each person takes back their own words only", async ({ enter }) => {
  const [wren, otto] = await pair(enter, "Undo in prose");
  await typeAtEnd(wren, "Wren begins.");
  await expect(prose(otto)).toContainText("Wren begins.");
  await typeAtEnd(otto, " Otto adds.");
  await expect(prose(wren)).toContainText("Wren begins. Otto adds.");

  await wren.keyboard.press(UNDO);
  for (const page of [wren, otto]) {
    await expect(prose(page)).toContainText("Otto adds.");
    await expect(prose(page)).not.toContainText("Wren begins.");
  }
  await wren.keyboard.press(REDO);
  await expect(prose(otto)).toContainText("Wren begins.");
  await otto.keyboard.press(UNDO);
  for (const page of [wren, otto]) {
    await expect(prose(page)).toContainText("Wren begins.");
    await expect(prose(page)).not.toContainText("Otto adds.");
  }
  // What others typed is no step of one's own.
  await expect(otto.getByRole("button", { name: "Undo my last change" })).toBeDisabled();
});

test("in a field, undo goes through the notebook's history, one value at a time, and on into prose", async ({
  enter,
}) => {
  const [wren, otto] = await pair(enter, "Undo in a field");
  await typeAtEnd(wren, "Before the block.");
  await placeLantern(wren);
  const threshold = field(wren, "value of scale 1");
  await threshold.fill("2.5 TeV");
  // A pause commits; the colleague has the value while the focus stays in the field.
  await expect(field(otto, "value of scale 1")).toHaveValue("2.5 TeV");
  await threshold.fill("2.8 TeV");
  await expect(field(otto, "value of scale 1")).toHaveValue("2.8 TeV");
  await expect(threshold).toBeFocused();

  await wren.keyboard.press(UNDO);
  for (const page of [wren, otto]) await expect(field(page, "value of scale 1")).toHaveValue("2.5 TeV");
  await wren.keyboard.press(UNDO);
  for (const page of [wren, otto]) await expect(field(page, "value of scale 1")).toHaveValue("3.2(4) TeV");
  await wren.keyboard.press(REDO);
  for (const page of [wren, otto]) await expect(field(page, "value of scale 1")).toHaveValue("2.5 TeV");

  // From the prose the same history goes on: the newest step is still the one in the field.
  await prose(wren).getByText("Before the block.").click();
  await wren.keyboard.press(UNDO);
  for (const page of [wren, otto]) await expect(field(page, "value of scale 1")).toHaveValue("3.2(4) TeV");
  await expect(prose(wren)).toContainText("Before the block.");
});

test("what a colleague has overwritten is not undone, is said, and no older step goes instead", async ({
  enter,
}) => {
  const [wren, otto] = await pair(enter, "Overwritten by a colleague");
  await placeLantern(wren);
  await fillField(block(wren, "Premises"), "value of scale 2", "300 GeV");
  await fillField(block(wren, "Premises"), "value of scale 1", "2.5 TeV");
  await expect(field(otto, "value of scale 1")).toHaveValue("2.5 TeV");
  await fillField(block(otto, "Premises"), "value of scale 1", "4 TeV");
  await expect(field(wren, "value of scale 1")).toHaveValue("4 TeV");

  await field(wren, "value of scale 1").press(UNDO);
  await expect(wren.getByRole("status", { name: "Notices" }).getByText(OVERWRITTEN)).toBeVisible();
  await expect(field(wren, "value of scale 1")).toHaveValue("4 TeV");
  // The older step, in the other field, was left alone and is the next to go.
  await expect(field(wren, "value of scale 2")).toHaveValue("300 GeV");
  await field(wren, "value of scale 1").press(UNDO);
  await expect(field(otto, "value of scale 2")).toHaveValue("350 GeV");
  await expect(field(otto, "value of scale 1")).toHaveValue("4 TeV");
});

test("undoing the deletion of a block brings every field and row back", async ({ enter }) => {
  const [wren, otto] = await pair(enter, "Deleted and restored");
  const premises = await placeLantern(wren);
  const before = await valuesIn(premises);
  expect(before).toContain("c_6/Lambda^2 chi^6");
  await premises.getByRole("button", { name: "delete Premises" }).click();
  for (const page of [wren, otto]) await expect(block(page, "Premises")).toHaveCount(0);

  await wren.keyboard.press(UNDO);
  for (const page of [wren, otto]) {
    await expect(block(page, "Premises")).toHaveCount(1);
    await expect.poll(() => valuesIn(block(page, "Premises"))).toEqual(before);
  }
});

test("two people in different fields and rows of one block both keep their change", async ({ enter }) => {
  const [wren, otto] = await pair(enter, "Different fields of one block");
  await placeLantern(wren);
  await expect(field(otto, "term, as typed of term 1")).toHaveValue("c_6/Lambda^2 chi^6");
  await Promise.all([
    fillField(block(wren, "Premises"), "value of scale 1", "2.9 TeV"),
    fillField(block(otto, "Premises"), "value of scale 2", "410 GeV"),
  ]);
  await Promise.all([
    addRow(wren, block(wren, "Premises"), "term", ["term, as typed", "lambda/4! chi^4"]),
    fillField(block(otto, "Premises"), "term, as typed of term 1", "c_6/(6! Lambda^2) chi^6"),
  ]);
  for (const page of [wren, otto]) {
    await expect(field(page, "value of scale 1")).toHaveValue("2.9 TeV");
    await expect(field(page, "value of scale 2")).toHaveValue("410 GeV");
    await expect(field(page, "term, as typed of term 1")).toHaveValue("c_6/(6! Lambda^2) chi^6");
    await expect(field(page, "term, as typed of term 2")).toHaveValue("lambda/4! chi^4");
  }
});

test("two people in one field see each other there; the last value wins and the other is told", async ({
  enter,
}) => {
  const [wren, otto] = await pair(enter, "Both in one field");
  await placeLantern(wren);
  await field(wren, "value of scale 1").focus();
  await field(otto, "value of scale 1").focus();
  await expect(block(wren, "Premises").getByText("Otto Lantern is in this field")).toBeAttached();
  await expect(block(otto, "Premises").getByText("Wren Lantern is in this field")).toBeAttached();

  await field(wren, "value of scale 1").fill("2.5 TeV");
  await expect(field(otto, "value of scale 1")).toHaveValue("2.5 TeV");
  await expect(
    block(otto, "Premises").getByText("Wren Lantern replaced “3.2(4) TeV” by “2.5 TeV”."),
  ).toBeVisible();
  await field(otto, "value of scale 1").fill("4 TeV");
  await expect(field(wren, "value of scale 1")).toHaveValue("4 TeV");
  await expect(
    block(wren, "Premises").getByText("Otto Lantern replaced “2.5 TeV” by “4 TeV”."),
  ).toBeVisible();
  await block(wren, "Premises").getByRole("button", { name: "Put back “2.5 TeV”" }).click();
  for (const page of [wren, otto]) await expect(field(page, "value of scale 1")).toHaveValue("2.5 TeV");
});

/** Everything that one has typed or chosen in a block, in its order. */
async function valuesIn(owner: Locator): Promise<readonly string[]> {
  return await owner
    .locator("input, select")
    .evaluateAll((fields) =>
      fields.map((each) =>
        each instanceof HTMLInputElement || each instanceof HTMLSelectElement ? each.value : "",
      ),
    );
}
