import { afterEach, describe, expect, it } from "vitest";
import { rows } from "../../server/data/database.ts";
import { enqueueLetter } from "../../server/mail/queue.ts";
import { secondsUntilRetry } from "../../server/mail/sender.ts";
import { createWorld, eventually, type World } from "./http-world.ts";

interface Queued {
  readonly attempts: number;
  readonly last_error: string | null;
  readonly is_sent: boolean;
  readonly is_given_up: boolean;
  readonly wait: number;
}

describe("the mail queue", () => {
  let world: World;
  let refusal: "later" | "never" | null = null;
  afterEach(() => world.stop());

  async function open(environment: Record<string, string> = {}): Promise<void> {
    world = await createWorld({ environment, smtp: { refusal: () => refusal } });
  }
  const enqueue = (subject: string) =>
    world.database.transaction((transaction) =>
      enqueueLetter(transaction, { recipient: "lena@example.org", subject, body: "Dear Lena,\n\n.\nyours" }),
    );
  async function queued(): Promise<Queued | null> {
    const [row] = await rows<Queued>(
      world.database,
      `select attempts, last_error, sent_at is not null as is_sent, given_up_at is not null as is_given_up,
              extract(epoch from next_attempt_at - now())::float as wait from mail_queue`,
    );
    return row ?? null;
  }

  it("sends a letter as soon as it was committed, once", async () => {
    refusal = null;
    await open();
    await enqueue("Hello");
    const [letter] = await eventually(() =>
      world.mailbox.letters().length > 0 ? world.mailbox.letters() : null,
    );
    expect(letter).toMatchObject({
      from: '"Subleading" <subleading@localhost>',
      to: "lena@example.org",
      subject: "Hello",
      text: "Dear Lena,\n\n.\nyours\n",
    });
    expect(await eventually(async () => ((await queued())?.is_sent ? queued() : null))).toMatchObject({
      attempts: 1,
    });
    const [{ id } = { id: "" }] = await rows<{ id: string }>(world.database, "select id from mail_queue");
    expect(letter?.messageId).toBe(`<${id}@127.0.0.1>`);
  });

  it("sends nothing of a transaction that was taken back", async () => {
    refusal = null;
    await open();
    const taken = world.database.transaction(async (transaction) => {
      await enqueueLetter(transaction, { recipient: "lena@example.org", subject: "Never", body: "" });
      throw new Error("taken back");
    });
    await expect(taken).rejects.toThrow("taken back");
    await enqueue("Sent");
    await eventually(() => (world.mailbox.letters().length > 0 ? true : null));
    expect(world.mailbox.letters().map(({ subject }) => subject)).toEqual(["Sent"]);
  });

  it("tries later what a busy server puts off, and sends it when its time comes", async () => {
    refusal = "later";
    await open();
    await enqueue("Patience");
    const row = await eventually(async () => ((await queued())?.attempts === 1 ? queued() : null));
    expect(row).toMatchObject({ is_sent: false, is_given_up: false });
    expect(row.last_error).toMatch(/451/);
    expect(row.wait).toBeGreaterThan(10);
    expect(row.wait).toBeLessThanOrEqual(20);
    refusal = null;
    await rows(world.database, "update mail_queue set next_attempt_at = now()");
    await rows(world.database, "select pg_notify('mail', '')");
    await eventually(async () => ((await queued())?.is_sent ? true : null));
    expect(world.mailbox.letters()).toHaveLength(1);
  });

  it("gives up on an address that does not exist", async () => {
    refusal = "never";
    await open();
    await enqueue("Nobody");
    const row = await eventually(async () => ((await queued())?.attempts === 1 ? queued() : null));
    expect(row).toMatchObject({ is_sent: false, is_given_up: true });
  });

  it("keeps letters while there is no mail service", async () => {
    await open({ SMTP_URL: "" });
    await enqueue("Later");
    expect(await queued()).toMatchObject({ attempts: 0, is_sent: false });
  });

  it("stores letters that cannot be delivered because nobody listens", async () => {
    await open({ SMTP_URL: "smtp://127.0.0.1:1" });
    await enqueue("Away");
    const row = await eventually(async () => ((await queued())?.attempts === 1 ? queued() : null));
    expect(row).toMatchObject({ is_sent: false, is_given_up: false });
  });
});

describe("the wait before another attempt", () => {
  it("doubles, up to six hours", () => {
    expect([1, 2, 3, 9, 10, 20, 60].map(secondsUntilRetry)).toEqual([
      20, 40, 80, 5120, 10_240, 21_600, 21_600,
    ]);
  });
});
