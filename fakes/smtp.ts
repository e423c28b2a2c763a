/** A local stand-in for a mail service: takes every letter, delivers none, shows them on a page. */
import type { AddressInfo } from "node:net";
import express from "express";
import { simpleParser, type AddressObject } from "mailparser";
import { SMTPServer } from "smtp-server";
import { pageHeaders, startLocalServer } from "./local-server.ts";
import { letterPage, mailboxPage } from "./smtp-pages.ts";

export interface Letter {
  readonly id: number;
  readonly from: string;
  readonly to: string;
  readonly subject: string;
  readonly text: string;
  readonly messageId: string;
  readonly headerNames: readonly string[];
  readonly receivedAt: string;
}
export interface SmtpFakeOptions {
  /** Of the mailbox page. */
  readonly port?: number;
  readonly smtpPort?: number;
  /** Refuse the next letters: "later" as a busy server does (4xx), "never" as for an unknown address (5xx). */
  readonly refusal?: () => "later" | "never" | null;
}
export interface SmtpFake {
  /** The mailbox page; /letters.json beside it. */
  readonly url: string;
  readonly smtpUrl: string;
  letters(): readonly Letter[];
  stop(): Promise<void>;
}

const MOST_LETTERS = 500;
const LARGEST_BYTES = 1_000_000;

function addressText(address: AddressObject | AddressObject[] | undefined): string {
  return [address ?? []]
    .flat()
    .map(({ text }) => text)
    .join(", ");
}

function refusalError(kind: "later" | "never"): Error {
  const responseCode = kind === "later" ? 451 : 550;
  return Object.assign(new Error(kind === "later" ? "Try again later" : "No such mailbox"), { responseCode });
}

export async function startSmtpFake(options: SmtpFakeOptions = {}): Promise<SmtpFake> {
  const { port = 0, smtpPort = 0, refusal = () => null } = options;
  const letters: Letter[] = [];
  let lastId = 0;

  const smtp = new SMTPServer({
    authOptional: true,
    disabledCommands: ["AUTH", "STARTTLS"],
    size: LARGEST_BYTES,
    disableReverseLookup: true,
    logger: false,
    onRcptTo: (_address, _session, done) => {
      const kind = refusal();
      done(kind === null ? null : refusalError(kind));
    },
    onData: (stream, _session, done) => {
      simpleParser(stream).then(
        (mail) => {
          letters.push({
            id: ++lastId,
            from: addressText(mail.from),
            to: addressText(mail.to),
            subject: mail.subject ?? "",
            text: mail.text ?? "",
            messageId: mail.messageId ?? "",
            headerNames: [...mail.headers.keys()],
            receivedAt: new Date().toISOString(),
          });
          if (letters.length > MOST_LETTERS) letters.shift();
          done();
        },
        (error: unknown) => done(error instanceof Error ? error : new Error(String(error))),
      );
    },
  });
  // A client that breaks off in mid-letter is its own problem, not a reason to end.
  smtp.on("error", (error) => process.stderr.write(`The mail stand-in met an error: ${error.message}\n`));
  await new Promise<void>((resolve, reject) => {
    smtp.server.once("error", reject);
    smtp.listen(smtpPort, "127.0.0.1", resolve);
  });
  // A server that listens on a port has an address of this kind, not a pipe's name.
  const smtpAddress = smtp.server.address() as AddressInfo;

  const app = express();
  app.disable("x-powered-by");
  app.get("/", (_request, response) => {
    response.set(pageHeaders).send(mailboxPage(letters.toReversed()));
  });
  app.get("/letters.json", (_request, response) => {
    response.set("cache-control", "no-store").json({ letters });
  });
  app.get("/letters/:id", (request, response) => {
    const letter = letters.find(({ id }) => String(id) === request.params.id);
    response
      .status(letter === undefined ? 404 : 200)
      .set(pageHeaders)
      .send(letterPage(letter));
  });
  const page = await startLocalServer(app, port);
  return {
    url: page.url,
    smtpUrl: `smtp://127.0.0.1:${smtpAddress.port}`,
    letters: () => [...letters],
    stop: async () => {
      await page.stop();
      await new Promise<void>((ended) => smtp.close(() => ended()));
    },
  };
}
