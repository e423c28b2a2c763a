/**
 * Sends what waits. Any number of servers may do so: each takes a letter under a row lock that others skip.
 * A process that dies between the sending and the commit sends the letter again, with the same Message-ID.
 */
import { createTransport, type Transporter } from "nodemailer";
import { firstRow, type Database } from "../data/database.ts";
import { listenForNotifications } from "../data/notifications.ts";
import type { Services } from "../services.ts";
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

interface PostOffice {
  readonly database: Database;
  readonly transport: Transporter;
  readonly from: string;
  /** Ends the Message-ID. */
  readonly host: string;
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

async function sendOne({ database, transport, from, host }: PostOffice): Promise<"sent" | "failed" | "none"> {
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

/** Begins at once; while the database or the mail service is away, letters wait and nothing else suffers. */
export function startMailSender({ configuration, publicUrl, database, log }: Services): MailSender {
  if (configuration.smtpUrl === null) {
    log.warn("SMTP_URL is not set: letters wait in the queue");
    return { stop: () => Promise.resolve() };
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
  const postOffice: PostOffice = {
    database,
    transport,
    from: configuration.mailFrom,
    host: new URL(publicUrl).hostname,
  };
  let stopped = false;
  let isAskedAgain = false;
  let work: Promise<void> | null = null;
  const mayGoOn = () => !stopped;
  const isAsked = () => isAskedAgain && mayGoOn();

  async function sendAll(): Promise<void> {
    // Told of another letter while looking: look once more, or it waits for the next round.
    while (isAsked()) {
      isAskedAgain = false;
      let result: Awaited<ReturnType<typeof sendOne>>;
      do {
        result = await sendOne(postOffice);
        if (result === "failed") log.warn("a letter could not be sent");
      } while (result !== "none" && mayGoOn());
    }
  }
  function look(): void {
    isAskedAgain = true;
    work ??= sendAll()
      .catch((error: unknown) => log.error({ err: error }, "the mail queue cannot be read"))
      .finally(() => {
        work = null;
        // Told of a letter between the last look and this moment.
        if (isAsked()) look();
      });
  }
  const timer = setInterval(look, LOOK_EVERY_MS);
  timer.unref();
  const { databaseUrl } = configuration;
  const channels = [MAIL_CHANNEL];
  const listening = listenForNotifications({ databaseUrl, channels, log, onNotification: look, onGap: look });
  // A letter queued before the listener was there was not announced to it. Without the listener a letter waits for the
  // next round, which is late but not lost.
  listening.then(look, (error: unknown) => log.error({ err: error }, "new letters are not announced"));
  look();
  return {
    stop: async () => {
      stopped = true;
      clearInterval(timer);
      await listening.then(
        (notifications) => notifications.stop(),
        () => undefined, // It never listened; that was logged above.
      );
      await work;
      transport.close();
    },
  };
}
