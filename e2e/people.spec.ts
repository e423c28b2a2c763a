/** Who takes part: invited, demoted, removed, the last owner, and a session that ends while one types. */
import pg from "pg";
import type { Page } from "playwright/test";
import {
  invite,
  isSaved,
  makeNotebook,
  openNotebook,
  openSharing,
  prose,
  readProse,
  says,
  typeAtEnd,
} from "./notebook.ts";
import { signIn, test, expect } from "./stage.ts";

/** A change of what someone may do reaches their open page within about this time. */
const A_SECOND_OR_SO = 2_500;

test("an invitation waits for someone who has never signed in, is mailed, and is claimed", async ({
  enter,
  stack,
}) => {
  const wren = await enter("wren-lantern");
  const notebook = await makeNotebook(wren.page, "For a newcomer");
  await invite(wren.page, notebook, "lena-newcomer@example.org");
  await openSharing(wren.page, notebook);
  const waiting = wren.page.getByRole("region", { name: "Waiting" });
  await expect(waiting).toContainText("lena-newcomer@example.org");

  const mailbox = await wren.context.newPage();
  await expect(async () => {
    await mailbox.goto(stack.mailboxUrl ?? "");
    await expect(mailbox.getByText("to lena-newcomer@example.org")).toBeVisible({ timeout: 500 });
  }).toPass();
  await mailbox.getByRole("link", { name: "Wren Lantern invites you to “For a newcomer”" }).click();
  await expect(mailbox.getByText(notebook)).toBeVisible();
  await expect(mailbox.getByText(/as an author: you can edit it/)).toBeVisible();

  const lena = await enter("lena-newcomer");
  await lena.page.getByRole("link", { name: "For a newcomer" }).click();
  await isSaved(lena.page);
  await typeAtEnd(lena.page, "I am here.");
  await isSaved(lena.page);
  await wren.page.reload();
  await expect(waiting).toHaveCount(0);
  await expect(wren.page.getByLabel("Role of Lena Newcomer")).toHaveValue("author");
});

test("an unverified e-mail address claims nothing; the account name does", async ({ enter }) => {
  const wren = await enter("wren-lantern");
  const byMail = await makeNotebook(wren.page, "Invited by an address nobody verified");
  await invite(wren.page, byMail, "mika-unverified@example.org");
  await wren.page.getByRole("link", { name: "Subleading" }).click();
  const byName = await makeNotebook(wren.page, "Invited by account name");
  await invite(wren.page, byName, "mika-unverified", "Reader");

  const mika = await enter("mika-unverified");
  await expect(mika.page.getByRole("link", { name: "Invited by account name" })).toBeVisible();
  await expect(mika.page.getByRole("link", { name: "Invited by an address nobody verified" })).toHaveCount(0);
  await mika.page.goto(byMail);
  await expect(mika.page.getByRole("heading", { name: "This notebook is not open to you" })).toBeVisible();
});

test("a demoted author's open editor turns read-only, a removed person is cut, both in words", async ({
  enter,
}) => {
  const otto = await enter("otto-lantern");
  const wren = await enter("wren-lantern");
  const notebook = await makeNotebook(wren.page, "Changing roles");
  await invite(wren.page, notebook, "otto-lantern");
  await openNotebook(otto.page, notebook);
  await typeAtEnd(otto.page, "Otto was an author.");
  await isSaved(otto.page);
  await openSharing(wren.page, notebook);
  const role = wren.page.getByLabel("Role of Otto Lantern");

  await role.selectOption("Reader");
  await expect(wren.page.getByText("Otto Lantern is now reader.")).toBeVisible();
  await expect(readProse(otto.page)).toBeVisible({ timeout: A_SECOND_OR_SO });
  await expect(prose(otto.page)).toHaveCount(0);
  await says(otto.page, "reading only");
  await readProse(otto.page).getByText("Otto was an author.").click();
  await otto.page.keyboard.type("Nor this.");
  await expect(readProse(otto.page)).not.toContainText("Nor this.");

  await role.selectOption("Author");
  await expect(wren.page.getByText("Otto Lantern is now author.")).toBeVisible();
  await expect(prose(otto.page)).toBeVisible({ timeout: A_SECOND_OR_SO });
  await typeAtEnd(otto.page, " And is again.");
  await isSaved(otto.page);

  await wren.page.getByRole("button", { name: "Remove Otto Lantern" }).click();
  await wren.page.getByRole("dialog").getByRole("button", { name: "Remove" }).click();
  await expect(wren.page.getByText("Otto Lantern no longer takes part.")).toBeVisible();
  await expect(otto.page.getByText(/no longer (have access|open)|not open to you/).first()).toBeVisible({
    timeout: A_SECOND_OR_SO,
  });
  await expect(prose(otto.page)).toHaveCount(0);
  await expect(otto.page.getByText("Otto was an author.")).toHaveCount(0);
  await otto.page.reload();
  await expect(otto.page.getByRole("heading", { name: "This notebook is not open to you" })).toBeVisible();
});

test("the last owner cannot step down, and is told why", async ({ enter }) => {
  const wren = await enter("wren-lantern");
  const notebook = await makeNotebook(wren.page, "One owner only");
  await openSharing(wren.page, notebook);
  await wren.page.getByLabel("Role of Wren Lantern").selectOption("Author");
  const question = wren.page.getByRole("dialog", { name: "Change your own role?" });
  await question.getByRole("button", { name: "Change my role" }).click();
  await expect(question.getByText("You are the only owner. Make someone else owner first.")).toBeVisible();
  await question.getByRole("button", { name: "Keep it as it is" }).click();
  await expect(wren.page.getByLabel("Role of Wren Lantern")).toHaveValue("owner");
});

test("typing that was not sent outlives the session, and signing in leads back to it", async ({
  enter,
  line,
  stack,
}) => {
  const wren = await enter("wren-lantern");
  const otto = await enter("otto-lantern", line);
  const notebook = await makeNotebook(wren.page, "A session that ends");
  await invite(wren.page, notebook, "otto-lantern");
  await openNotebook(otto.page, notebook);
  await typeAtEnd(otto.page, "Sent.");
  await isSaved(otto.page);

  // The lid is closed over a weekend: no network, and the session ends meanwhile.
  line.cut();
  await typeAtEnd(otto.page, " Not sent yet.");
  await says(otto.page, /^offline/);
  await endSessionsOf(stack.databaseUrl, "otto-lantern");
  line.restore();
  await says(otto.page, "signed out: what you typed is kept on this device until you sign in again");
  await expect(otto.page.getByText("Sent. Not sent yet.")).toBeVisible();

  await signInAgain(otto.page, "otto-lantern");
  await otto.page.waitForURL(notebook);
  await isSaved(otto.page);
  await expect(prose(otto.page)).toContainText("Sent. Not sent yet.");
  await expect(prose(wren.page)).toContainText("Sent. Not sent yet.");
});

test("a page that needs a person asks for one and comes back to the same place", async ({
  enter,
  visit,
  stack,
}) => {
  const wren = await enter("wren-lantern");
  const notebook = await makeNotebook(wren.page, "Asked for without a session");
  const page = await visit();
  await page.goto(`${notebook}/sharing`);
  await expect(page.getByRole("heading", { name: "Sign in to open this page" })).toBeVisible();
  await page.getByRole("link", { name: /sign in/i }).click();
  await page.getByRole("button", { name: "Continue as wren-lantern" }).click();
  await page.waitForURL(`${notebook}/sharing`);
  await expect(page.getByRole("heading", { name: "Sharing", level: 1 })).toBeVisible();

  await page.getByRole("button", { name: "Sign out" }).click();
  await expect(page.getByRole("link", { name: /sign in/i }).first()).toBeVisible();
  await page.goto(notebook);
  await expect(page.getByRole("heading", { name: "Sign in to open this page" })).toBeVisible();
  // The other browser of the same person is still signed in.
  await wren.page.reload();
  await expect(prose(wren.page)).toBeVisible();

  const declining = await visit();
  await declining.goto(stack.url);
  await declining
    .getByRole("link", { name: /sign in/i })
    .first()
    .click();
  await declining.getByRole("button", { name: "Continue as nora-declines" }).click();
  await expect(declining.getByText(/You did not allow the sign-in/)).toBeVisible();
  await signIn(declining, stack.url, "ravi-ledger");
});

async function signInAgain(page: Page, login: string): Promise<void> {
  await page.getByRole("link", { name: "Sign in again" }).click();
  await page.getByRole("button", { name: `Continue as ${login}` }).click();
}

async function endSessionsOf(databaseUrl: string, login: string): Promise<void> {
  const client = new pg.Client({ connectionString: databaseUrl });
  await client.connect();
  try {
    const ended = await client.query(
      `delete from sessions using people where people.login = $1 and strpos(sess::text, people.id::text) > 0`,
      [login],
    );
    expect(ended.rowCount).toBeGreaterThan(0);
  } finally {
    await client.end();
  }
}
