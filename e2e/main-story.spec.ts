/** The whole job: two people write one argument, let it be computed, pin its numbers, and send it to a referee. */
import type { Page } from "playwright/test";
import type { Stack } from "../server/start/stack.mjs";
import { openByHand } from "./hand-socket.ts";
import {
  addRow,
  block,
  choose,
  fillField,
  invite,
  isSaved,
  makeNotebook,
  makeRefereeLink,
  openNotebook,
  placeAtEnd,
  placeByKeyboard,
  prose,
  readProse,
  revokeRefereeLink,
  typeAtEnd,
} from "./notebook.ts";
import { test, expect, type Player } from "./stage.ts";

const TITLE = "Lantern amplitude, written together";

test("two people write, compute, pin, see what a premise moves, and a referee reads it", async ({
  enter,
  visit,
  stack,
}) => {
  test.slow();
  const otto = await enter("otto-lantern");
  const wren = await enter("wren-lantern");
  const notebook =
    await test.step("one makes the notebook and invites the other by account name", async () => {
      const address = await makeNotebook(wren.page, TITLE);
      await invite(wren.page, address, "otto-lantern");
      await otto.page.getByRole("link", { name: "Subleading" }).click();
      await otto.page.getByRole("link", { name: TITLE }).click();
      await isSaved(otto.page);
      return address;
    });

  await test.step("both write in one sentence and see each other's names", () => writeTogether(wren, otto));
  await test.step("they state the premises and place what follows", () => stateAndCompute(wren, otto));
  await test.step("two numbers are pinned into sentences", () => pinTwo(wren, otto));
  await test.step("the other changes the threshold, and both see what moved", () =>
    moveThreshold(wren, otto));
  await test.step("the shelf counts what moved; one click accepts", async () => {
    const shelf = await wren.context.newPage();
    await shelf.goto(`${stack.url}/shelf`);
    const row = shelf.getByRole("row", { name: TITLE });
    await expect(row.getByText("2 moved")).toBeVisible();
    await prose(wren.page)
      .getByRole("button", { name: /^accept .* moved · Otto Lantern/ })
      .first()
      .click();
    for (const { page } of [wren, otto]) {
      await expect(page.getByRole("banner").getByRole("button", { name: "pin: 1 moved" })).toBeVisible();
    }
    await shelf.reload();
    await expect(row.getByText("1 moved")).toBeVisible();
    await shelf.close();
  });
  await test.step("everything is there for someone who opens it afresh", async () => {
    await openNotebook(otto.page, notebook);
    await expect(prose(otto.page)).toContainText("The threshold decides. So does the probe.");
    await expect(prose(otto.page)).toContainText(/Q = 0\.14/);
    await expect(otto.page.getByRole("banner").getByRole("button", { name: "pin: 1 moved" })).toBeVisible();
  });

  const address = await test.step("the owner makes a referee link", () =>
    makeRefereeLink(wren.page, notebook, "journal, first round"));
  await openNotebook(wren.page, notebook);
  const referee = await visit();
  await test.step("a third person reads without an account, and cannot write", () =>
    readOnly(referee, wren.page, address));
  await test.step("nor by driving the socket by hand", () =>
    forgeNothing(stack, notebook, address, wren.page));
  await test.step("a revoked link cuts the open page and says so", async () => {
    const owner = await wren.context.newPage();
    await revokeRefereeLink(owner, notebook, "journal, first round");
    await expect(referee.getByRole("heading", { name: "This link opens nothing" })).toBeVisible();
    await expect(
      referee.getByText("The authors have closed this link. Ask them for a new one."),
    ).toBeVisible();
    await expect(readProse(referee)).toHaveCount(0);
    await referee.reload();
    await expect(
      referee.getByText("The authors have closed this link. Ask them for a new one."),
    ).toBeVisible();
    const refused = await openByHand(stack, notebook, tokenOf(address));
    expect(refused.closedWith()).not.toBeNull();
    expect(refused.text()).toBe("");
  });
});

async function readOnly(referee: Page, author: Page, address: string): Promise<void> {
  await referee.goto(address);
  const text = readProse(referee);
  await expect(text).toContainText("The threshold decides. So does the probe.");
  await expect(referee.getByText(/read-only: what its authors change appears here/)).toBeVisible();
  await expect(block(referee, "Order plan")).toContainText("is met at order");
  await expect(prose(referee)).toHaveCount(0);
  await expect(text.getByRole("button", { name: /^accept/ })).toHaveCount(0);
  // Fields are shown as what they hold; none takes a letter.
  const threshold = block(referee, "Premises").getByLabel("value of scale 1", { exact: true });
  await threshold.press("9");
  await expect(threshold).toHaveValue("2.5(3) TeV");
  const sentence = text.getByText("The threshold decides.");
  await sentence.click();
  await referee.keyboard.type("The referee was here.");
  // What the authors write afterwards arrives: had the referee's letters been sent, they would be there by then.
  await typeAtEnd(author, " The authors go on.");
  await expect(text).toContainText("The authors go on.");
  await expect(text).not.toContainText("The referee was here.");
  await isSaved(author);
  await expect(prose(author)).not.toContainText("The referee was here.");
}

async function forgeNothing(stack: Stack, notebook: string, address: string, author: Page): Promise<void> {
  const socket = await openByHand(stack, notebook, tokenOf(address));
  expect(socket.text()).toContain("The threshold decides.");
  socket.forge("Forged by hand.");
  // Frames are handled in order, and what is refused may close the socket: the next words settle either.
  await typeAtEnd(author, " They finish.");
  await isSaved(author);
  await expect.poll(() => socket.closedWith() !== null || socket.text().includes("They finish.")).toBe(true);
  socket.close();
  const after = await openByHand(stack, notebook, tokenOf(address));
  expect(after.text()).toContain("They finish.");
  expect(after.text()).not.toContain("Forged by hand.");
  after.close();
  await expect(prose(author)).not.toContainText("Forged by hand.");
  await expect(author.getByRole("list", { name: "Here now" })).not.toContainText("Forged by hand.");
}

const tokenOf = (address: string) => address.slice(address.lastIndexOf("/") + 1);

async function writeTogether(wren: Player, otto: Player): Promise<void> {
  await typeAtEnd(wren.page, "The threshold decides.");
  await expect(prose(otto.page)).toContainText("The threshold decides.");
  await expect(prose(otto.page).getByText("Wren Lantern")).toBeVisible();
  await typeAtEnd(otto.page, " So does the probe.");
  await expect(prose(wren.page)).toContainText("The threshold decides. So does the probe.");
  await expect(prose(wren.page).getByText("Otto Lantern")).toBeVisible();
  for (const { page } of [wren, otto]) {
    const here = page.getByRole("list", { name: "Here now" });
    await expect(here).toContainText("Wren Lantern");
    await expect(here).toContainText("Otto Lantern");
  }
}

async function stateAndCompute(wren: Player, otto: Player): Promise<void> {
  const { page } = wren;
  await page.keyboard.press("Control+End");
  await page.keyboard.press("Enter");
  await placeByKeyboard(page, "Premises");
  const premises = block(page, "Premises");
  await expect(premises.getByLabel("name of the theory")).toBeFocused();
  await page.keyboard.type("Lantern");
  await addRow(page, premises, "field", ["symbol", "chi"]);
  await addRow(page, premises, "scale", ["symbol", "Lambda"], { value: "3.2(4) TeV", role: "heavy" });
  await addRow(page, premises, "scale", ["symbol", "p"], { value: "350 GeV", role: "probe" });
  await addRow(page, premises, "term", ["term, as typed", "lambda/4! chi^4"]);
  await addRow(page, premises, "term", ["term, as typed", "c_6/(6! Lambda^2) chi^6"]);
  await addRow(page, premises, "term", ["term, as typed", "c_8/Lambda^4 d^4 chi^4"]);

  const scaling = await placeAtEnd(page, "Scaling");
  await expect(scaling.getByRole("table", { name: "Scaling of every term" })).toContainText("irrelevant");

  const divergence = await placeAtEnd(page, "Divergence");
  await addRow(page, divergence, "vertex", ["how many", "2"], { "of the term": "λ/(4!) χ⁴" });
  await addRow(page, divergence, "leg", ["how many", "4"], { "of the field": "χ" });
  await expect(divergence).toContainText("logarithmic");

  // The colleague places the other two, standing on the same premises.
  const plan = await placeAtEnd(otto.page, "Order plan");
  await fillField(plan, "target accuracy", "1e-3");
  await expect(plan).toContainText("is met at order");

  const truncation = await placeAtEnd(otto.page, "Truncation error");
  await addRow(otto.page, truncation, "order", ["order n", "0"], { "X through it": "8.000" });
  await addRow(otto.page, truncation, "order", ["order n", "1"], { "X through it": "9.050" });
  await addRow(otto.page, truncation, "order", ["order n", "2"], { "X through it": "9.200" });
  await choose(truncation, "method pointed out", "uniform prior");
  await expect(truncation.getByRole("table", { name: /Truncation error after order 2/ })).toBeVisible();
  await expect(block(page, "Order plan")).toContainText("is met at order");
  await expect(
    block(page, "Truncation error").getByRole("table", { name: /Truncation error after order 2/ }),
  ).toBeVisible();
  for (const { page: either } of [wren, otto]) await isSaved(either);
}

/** One through the index, one from the block's own figure. */
async function pinTwo(wren: Player, otto: Player): Promise<void> {
  const { page } = wren;
  await typeAtEnd(page, "The expansion parameter is Q = ");
  await placeByKeyboard(page, "Pin");
  await expect(page.getByRole("dialog", { name: "Pin a number into the prose" })).toBeVisible();
  await page.keyboard.type("Scaling Q");
  await page.keyboard.press("Enter");
  await expect(prose(page).getByRole("button", { name: /0\.109.*, pinned: .*it holds/ })).toBeVisible();
  await page.keyboard.type(", and what is left out is ");
  await block(page, "Order plan")
    .getByRole("button", { name: /pin this/ })
    .nth(2)
    .click();
  await page.keyboard.type(".");
  await expect(prose(page).getByRole("button", { name: /, pinned: .*it holds/ })).toHaveCount(2);
  await expect(prose(otto.page).getByRole("button", { name: /, pinned: .*it holds/ })).toHaveCount(2);
  await isSaved(page);
}

async function moveThreshold(wren: Player, otto: Player): Promise<void> {
  await fillField(block(otto.page, "Premises"), "value of scale 1", "2.5(3) TeV");
  for (const { page } of [wren, otto]) {
    await expect(prose(page).getByRole("button", { name: /0\.109.*it has moved to 0\.14/ })).toBeVisible();
    await expect(prose(page).getByRole("button", { name: /it has moved to/ })).toHaveCount(2);
    await expect(
      prose(page).getByRole("button", { name: /^accept .*, moved · Otto Lantern, \d\d:\d\d/ }),
    ).toHaveCount(2);
    await expect(page.getByRole("banner").getByRole("button", { name: "pins: 2 moved" })).toBeVisible();
  }
}
