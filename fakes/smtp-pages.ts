/** The pages of the mail stand-in. */
import { escapeHtml, standInPage } from "./local-server.ts";
import type { Letter } from "./smtp.ts";

const notice = `<p class="notice">This is a local stand-in for a mail service: letters end here and are sent to nobody.</p>`;

export function mailboxPage(letters: readonly Letter[]): string {
  const lines = letters.map(
    ({ id, to, subject, receivedAt }) =>
      `<li><a href="/letters/${id}">${escapeHtml(subject)}</a><br>to ${escapeHtml(to)}, ${escapeHtml(receivedAt)}</li>`,
  );
  const list = lines.length === 0 ? "<p>No letters yet.</p>" : `<ul>${lines.join("")}</ul>`;
  return standInPage("Local mailbox", `<h1>Letters</h1>${notice}${list}`);
}

export function letterPage(letter: Letter | undefined): string {
  if (letter === undefined)
    return standInPage("Local mailbox", `<h1>No such letter</h1><p><a href="/">All letters</a></p>`);
  return standInPage(
    letter.subject,
    `<h1>${escapeHtml(letter.subject)}</h1>${notice}
    <p>from ${escapeHtml(letter.from)}<br>to ${escapeHtml(letter.to)}</p>
    <pre>${escapeHtml(letter.text)}</pre><p><a href="/">All letters</a></p>`,
  );
}
