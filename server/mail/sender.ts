/**
 * Sends what waits. Any number of servers may do so: each takes a letter under a row lock that others skip.
 * A process that dies between the sending and the commit sends the letter again, with the same Message-ID.
 */
import { createTransport, type Transporter } from "nodemailer";
import type { Logger } from "pino";
import type { Configuration } from "../configuration.ts";
import { firstRow, type Database } from "../data/database.ts";
import { listenForNotifications } from "../data/notifications.ts";
import { MAIL_CHANNEL } from "./queue.ts";

export interface MailSender {
  stop(): Promise<void>;
}

interface Waiting {
  readonly id: string;
  readonly recipient: string;
  readonly subject: string;
  readonly body: string;
  readonly attempts: number;
}

const MOST_ATTEMPTS = 10;
const FIRST_RETRY_S = 20;
const LONGEST_RETRY_S = 6 * 60 * 60;
/** For letters whose time has come; a new one is announced. */
const LOOK_EVERY_MS = 15_000;
const SMTP_PATIENCE_MS = 20_000;

/** Doubles from 20 seconds to 6 hours; ten attempts span about three hours. */
export function secondsUntilRetry(attempts: number): number {
  return Math.min(FIRST_RETRY_S * 2 ** (attempts - 1), LONGEST_RETRY_S);
}

/** RFC 5321, section 4.2.1: a reply of the 5xx kind will not change by asking again. */
function isPermanent(error: unknown): boolean {
  const code: unknown = error instanceof Error && "responseCode" in error ? error.responseCode : undefined;
  return typeof code === "number" && code >= 500 && code < 600;
}

async function sendOne(
  database: Database,
  transport: Transporter,
  from: string,
  host: string,
): Promise<"sent" | "failed" | "none"> {
  return database.transaction(async (transaction) => {
    const letter = await firstRow<Waiting>(
      transaction,
      `select id, recipient, subject, body, attempts from mail_queue
        where sent_at is null and given_up_at is null and next_attempt_at <= now()
        order by next_attempt_at limit 1 for update skip locked`,
    );
    if (letter === undefined) return "none";
    const attempts = letter.attempts + 1;
    try {
      await transport.sendMail({
        from,
        to: { name: "", address: letter.recipient },
        subject: letter.subject,
        text: letter.body,
        messageId: `<${letter.id}@${host}>`,
        headers: { "Auto-Submitted": "auto-generated" },
      });
    } catch (error) {
      const words = error instanceof Error ? error.message : String(error);
      const givesUp = isPermanent(error) || attempts >= MOST_ATTEMPTS;
      await transaction.raw(
        `update mail_queue set attempts = ?, last_error = ?, next_attempt_at = now() + make_interval(secs => ?),
                given_up_at = case when ? then now() end
          where id = ?`,
        [attempts, words.slice(0, 500), secondsUntilRetry(attempts), givesUp, letter.id],
      );
      return "failed";
    }
    await transaction("mail_queue")
      .where({ id: letter.id })
      .update({ attempts, sent_at: transaction.fn.now() });
    return "sent";
  });
}

export async function startMailSender(
  configuration: Configuration,
  publicUrl: string,
  database: Database,
  log: Logger,
): Promise<MailSender | null> {
  if (configuration.smtpUrl === null) {
    log.warn("SMTP_URL is not set: letters wait in the queue");
    return null;
  }
  const transport = createTransport({
    url: configuration.smtpUrl,
    connectionTimeout: SMTP_PATIENCE_MS,
    greetingTimeout: SMTP_PATIENCE_MS,
    socketTimeout: SMTP_PATIENCE_MS,
    // A letter is text: nothing in it may make the mailer read a file or fetch an address.
    disableFileAccess: true,
    disableUrlAccess: true,
  });
  const { hostname } = new URL(publicUrl);
  let stopped = false;
  let work: Promise<void> | null = null;
  let isAskedAgain = false;

  async function sendAll(): Promise<void> {
    for (;;) {
      if (stopped) return;
      isAskedAgain = false;
      try {
        let result: Awaited<ReturnType<typeof sendOne>>;
        do {
          result = await sendOne(database, transport, configuration.mailFrom, hostname);
          if (result === "failed") log.warn("a letter could not be sent");
        } while (result !== "none" && !stopped);
      } catch (error) {
        log.error({ err: error }, "the mail queue cannot be read");
        return;
      }
      // Told of another letter while looking: look once more, or it waits for the next round.
      if (!isAskedAgain) return;
    }
  }
  function look(): void {
    if (stopped) return;
    isAskedAgain = true;
    work ??= sendAll().finally(() => {
      work = null;
    });
  }
  const notifications = await listenForNotifications({
    databaseUrl: configuration.databaseUrl,
    channels: [MAIL_CHANNEL],
    log,
    onNotification: look,
    onGap: look,
  });
  const timer = setInterval(look, LOOK_EVERY_MS);
  timer.unref();
  look();
  return {
    stop: async () => {
      stopped = true;
      clearInterval(timer);
      await notifications.stop();
      await work;
      transport.close();
    },
  };
}
