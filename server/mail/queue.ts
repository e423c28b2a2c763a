/** Letters wait in PostgreSQL, written in the transaction of what they tell, so neither exists without the other. */
import type { Queryable } from "../data/database.ts";

export interface Letter {
  readonly recipient: string;
  readonly subject: string;
  readonly body: string;
}
/** A word to the senders that a letter waits. */
export const MAIL_CHANNEL = "mail";

/** A header is one line: whatever breaks lines or hides becomes a space. */
function oneLine(text: string): string {
  return text.replace(/[\p{Cc}\p{Cf}\p{Zl}\p{Zp}]+/gu, " ").trim();
}

export async function enqueueLetter(transaction: Queryable, letter: Letter): Promise<void> {
  await transaction("mail_queue").insert({
    recipient: oneLine(letter.recipient),
    subject: oneLine(letter.subject).slice(0, 200),
    body: letter.body,
  });
  await transaction.raw("select pg_notify(?, '')", [MAIL_CHANNEL]);
}
