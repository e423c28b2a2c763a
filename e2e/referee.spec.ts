/** What a referee gets: the live notebook to read, every number to check, a copy to vary, and no way to write. */
import { createRequire } from "node:module";
import { readFileSync } from "node:fs";
import * as decoding from "lib0/decoding";
import * as encoding from "lib0/encoding";
import type { Page } from "playwright/test";
import * as Y from "yjs";
import { closeCode, FRAGMENT, messageType } from "../client/contract/collab.ts";
import { SCHEMA_VERSION } from "../client/schema/version.ts";
import { expect, test } from "./stage.ts";
import {
  block,
  fillField,
  invite,
  isSaved,
  makeNotebook,
  makeRefereeLink,
  openNotebook,
  prose,
  readProse,
  revokeRefereeLink,
  typeAtEnd,
} from "./notebook.ts";

const LANTERN = "A copy of the Lantern demonstration";
/** Sentences of the demonstration's pins, in the order of its text. */
const numbers = ["0.109(14)", "0.0120(30)", "0", "3", "5.4(28) × 10⁻⁴", "±0.00163 pb"];

test("a visitor without an account reads and checks every number, and hears when the link is closed", async ({
  enter,
  visit,
}) => {
  // The whole page is looked over several times on the way.
  test.slow();
  const owner = (await enter("wren-lantern")).page;
  const notebook = await makeNotebook(owner, "Read by a referee", LANTERN);
  const address = await makeRefereeLink(owner, notebook, "journal");
  const referee = await visit();
  await referee.goto(address);

  await test.step("it says what it is, whose, and until when", async () => {
    const about = referee.getByRole("region", { name: "About this page" });
    await expect(about).toContainText("You are reading a live notebook, read-only");
    await expect(about).toContainText("Written by Wren Lantern.");
    await expect(about).toContainText(/This link holds until \d+ \w+ \d{4} at \d\d:\d\d\./);
    await expect(readProse(referee)).toContainText("Below the threshold");
    await expect(referee.getByRole("link", { name: "Sign in" })).toHaveCount(0);
  });

  await test.step("nothing on the page can be written in", async () => {
    await expect(referee.locator("[contenteditable=true]")).toHaveCount(0);
    await expect(
      referee.locator(
        "main :is(input, textarea):not([readonly], [disabled], [aria-disabled=true]), main select:not([disabled])",
      ),
    ).toHaveCount(0);
  });

  const entries = referee.getByRole("region", { name: "Check sheet" }).locator(".check-entry");
  await test.step("the check sheet lists every number with its sentence, source and state", async () => {
    await expect(entries).toHaveCount(numbers.length);
    for (const [index, number] of numbers.entries()) {
      await expect(entries.nth(index).locator(".check-shown")).toHaveText(number);
      await expect(entries.nth(index)).toContainText("holds");
    }
    await expect(entries.nth(0)).toContainText("With");
    await expect(entries.nth(0)).toContainText("Scaling every term");
    await expect(entries.nth(0)).toContainText("Lambda 3.2(4) TeV heavy; p 350 GeV probe");
    await entries.nth(0).getByText("working").click();
    await expect(entries.nth(0).locator(".katex").nth(3)).toBeVisible();
  });

  await test.step("each is recomputed here, and agrees with the stored result and with the pin", async () => {
    // The server stores results a moment after the notebook was made.
    await expect(async () => {
      const stored = await referee.evaluate(
        async (token) => (await (await fetch(`/api/referee/${token}`)).json()).results.length as number,
        tokenOf(address),
      );
      expect(stored).toBe(5);
    }).toPass();
    await referee.reload();
    for (const [index, number] of numbers.entries()) {
      await entries
        .nth(index)
        .getByRole("button", { name: /^recompute/ })
        .click();
      await expect(entries.nth(index).getByRole("status")).toHaveText(
        `Recomputed here: ${number}. The pin agrees to 12 digits. The stored result agrees to 12 digits.`,
      );
    }
  });

  await test.step("its links lead to the sentence and to the block, by keyboard", async () => {
    await entries.nth(1).getByRole("button", { name: "to the sentence: 0.0120(30)" }).press("Enter");
    await expect(referee.locator(".pin-figure:focus")).toHaveText("0.0120(30)");
    await expect(referee.locator(".pin-figure:focus")).toBeInViewport();
    await entries.nth(3).getByRole("button", { name: "to its block: 3" }).press("Enter");
    await expect(block(referee, "Order plan").locator(":focus")).toHaveCount(1);
    await expect(block(referee, "Order plan")).toBeInViewport();
  });

  await test.step("what the owner writes appears, and what has moved shows both values and by whom", async () => {
    await openNotebook(owner, notebook);
    await fillField(block(owner, "Premises"), "value of scale 1", "2.5(3) TeV");
    await expect(entries.nth(0).locator(".check-shown")).toHaveText("0.109(14) 0.140(17)");
    await expect(entries.nth(0)).toContainText(
      /moved · Wren Lantern, \d\d:\d\d: was 0\.109\(14\), now 0\.140/,
    );
    await entries
      .nth(0)
      .getByRole("button", { name: /^recompute/ })
      .click();
    await expect(entries.nth(0).getByRole("status")).toContainText(
      "Recomputed here: 0.140(17). The pin says 0.109(14).",
    );
  });

  await test.step("it is sound for assistive technology, on a phone, and in both themes", async () => {
    await soundOn(referee);
    await referee.emulateMedia({ colorScheme: "dark" });
    await soundOn(referee);
    await referee.setViewportSize({ width: 390, height: 844 });
    expect(
      await referee.evaluate(() => document.documentElement.scrollWidth - window.innerWidth),
    ).toBeLessThanOrEqual(0);
    await referee.setViewportSize({ width: 1440, height: 900 });
    await referee.emulateMedia({ colorScheme: "light" });
  });

  await test.step("closing the link cuts the open page within seconds, and its address says so", async () => {
    await revokeRefereeLink(owner, notebook, "journal");
    const words = "The authors have closed this link. Ask them for a new one.";
    await expect(referee.getByRole("main").getByRole("alert")).toHaveText(words);
    await expect(readProse(referee)).toHaveCount(0);
    await referee.goto(address);
    await expect(referee.getByRole("heading", { level: 1 })).toHaveText("This link opens nothing");
    await expect(referee.getByRole("main").getByRole("alert")).toHaveText(words);
    await soundOn(referee);
    await referee.goto(new URL(`/r/${"A".repeat(43)}`, address).href);
    await expect(referee.getByRole("main").getByRole("alert")).toContainText(
      "No notebook is behind this link.",
    );
  });
});

test("inputs are varied in a scratch copy, of which nothing leaves the page", async ({ enter, visit }) => {
  const owner = (await enter("wren-lantern")).page;
  const notebook = await makeNotebook(owner, "Varied by a referee", LANTERN);
  const address = await makeRefereeLink(owner, notebook, "journal");
  await openNotebook(owner, notebook);
  const referee = await visit();
  await referee.addInitScript(watchStores);
  const network = watchNetwork(referee);
  await referee.goto(address);

  await expect(referee.getByRole("link", { name: "Check sheet: 6 numbers" })).toBeVisible();
  await referee.getByRole("button", { name: "Vary the inputs in a scratch copy" }).click();
  const strip = referee.getByRole("region", { name: "Scratch copy" });
  await expect(strip).toContainText("Nothing you change here is sent or kept");
  await expect(prose(referee)).toContainText("Below the threshold");
  await expect(referee.getByRole("link", { name: "Check sheet: 6 numbers" })).toBeVisible();
  await referee.waitForLoadState("networkidle");

  expect(network.left).toContain("a frame on a socket");
  network.forget();
  await fillField(block(referee, "Premises"), "value of scale 1", "2.5(3) TeV");
  await expect(
    prose(referee).getByRole("button", { name: /^0\.109\(14\).*it has moved to 0\.140\(17\)/ }),
  ).toBeVisible();
  await expect(referee.getByRole("link", { name: /^Check sheet: 6 numbers, \d moved/ })).toBeVisible();
  await typeAtEnd(referee, "A note to myself.");
  const entry = referee.locator(".check-entry").first();
  await entry.getByRole("button", { name: /^recompute/ }).click();
  await expect(entry.getByRole("status")).toContainText("The stored result is of other inputs");
  await soundOn(referee);
  // Long enough for anything that waits for a pause, or keeps a connection alive, to be caught.
  await referee.waitForTimeout(3_000);
  expect(network.left).toEqual([]);
  expect(await referee.evaluate(() => window.storeWrites)).toEqual([]);

  await strip.getByRole("button", { name: "Discard the scratch copy" }).click();
  await referee.getByRole("dialog").getByRole("button", { name: "Discard the copy" }).click();
  await expect(readProse(referee)).toContainText("Below the threshold");
  await expect(readProse(referee)).not.toContainText("A note to myself.");
  await expect(readProse(referee).getByRole("button", { name: /^0\.109\(14\).*it holds/ })).toBeVisible();
  await expect(block(owner, "Premises").getByLabel("value of scale 1")).toHaveValue("3.2(4) TeV");
  await expect(prose(owner)).not.toContainText("A note to myself.");

  await test.step("an untouched copy is put away without a question", async () => {
    await referee.getByRole("button", { name: "Vary the inputs in a scratch copy" }).click();
    await expect(prose(referee)).toContainText("Below the threshold");
    await strip.getByRole("button", { name: "Discard the scratch copy" }).click();
    await expect(readProse(referee)).toContainText("Below the threshold");
  });
});

test("whoever drives the socket by hand changes nothing with a referee link", async ({
  enter,
  visit,
  stack,
}) => {
  const owner = (await enter("wren-lantern")).page;
  const notebook = await makeNotebook(owner, "Not to be written in");
  await typeAtEnd(owner, "As the owner wrote it.");
  await isSaved(owner);
  const address = await makeRefereeLink(owner, notebook, "journal");
  await openNotebook(owner, notebook);
  const referee = await visit();
  await referee.goto(address);
  await expect(readProse(referee)).toContainText("As the owner wrote it.");

  const query = `?schema=${SCHEMA_VERSION}&referee=${tokenOf(address)}`;
  const socket = `${stack.url.replace(/^http/, "ws")}/collab/${new URL(notebook).pathname.split("/")[2]}${query}`;
  const held = new Y.Doc();
  apply(held, (await drive(referee, socket, [stepOne(held)])).received);
  const words = "WRITTEN BY HAND";
  const before = Y.encodeStateVector(held);
  const paragraph = new Y.XmlElement("paragraph");
  paragraph.insert(0, [new Y.XmlText(words)]);
  held.getXmlFragment(FRAGMENT).push([paragraph]);
  const change = Y.encodeStateAsUpdate(held, before);

  // The answer to the last frame comes after all before it were dealt with.
  const fresh = new Y.Doc();
  const answer = await drive(referee, socket, [frame(1, change), frame(2, change), stepOne(fresh)]);
  if (answer.closed === null) {
    apply(fresh, answer.received);
    expect(fresh.getXmlFragment(FRAGMENT).toJSON()).toContain("As the owner wrote it.");
  } else expect(answer.closed).toBe(closeCode.forbidden);
  expect(fresh.getXmlFragment(FRAGMENT).toJSON()).not.toContain(words);

  await typeAtEnd(owner, " And goes on.");
  await isSaved(owner);
  await expect(readProse(referee)).toContainText("As the owner wrote it. And goes on.");
  for (const page of [owner, referee]) {
    await expect(page.getByText(words)).toHaveCount(0);
    await page.reload();
    await expect(page.getByText("As the owner wrote it. And goes on.")).toBeVisible();
    await expect(page.getByText(words)).toHaveCount(0);
  }
});

test("a link that hides the authors shows no name, in the page or in what the server sends", async ({
  enter,
  visit,
}) => {
  const otto = (await enter("otto-lantern")).page;
  const owner = (await enter("wren-lantern")).page;
  const notebook = await makeNotebook(owner, "By whom is not said", LANTERN);
  await invite(owner, notebook, "otto-lantern");
  const address = await makeRefereeLink(owner, notebook, "blind", { hideAuthors: true });
  await openNotebook(owner, notebook);

  const referee = await visit();
  const sent: string[] = [];
  const answers: Promise<void>[] = [];
  referee.on("response", (response) => {
    // Hashed files are the program, the same for everyone.
    if (new URL(response.url()).pathname.startsWith("/assets/")) return;
    answers.push(response.text().then((body) => void sent.push(body)));
  });
  referee.on("websocket", (socket) => {
    socket.on("framereceived", ({ payload }) => sent.push(payload.toString("latin1" as BufferEncoding)));
  });
  await referee.goto(address);
  await expect(referee.getByRole("region", { name: "About this page" })).toContainText(
    "Its authors are not named.",
  );

  await openNotebook(otto, notebook);
  await typeAtEnd(otto, " Written while the referee reads.");
  await fillField(block(otto, "Premises"), "value of scale 1", "2.5(3) TeV");
  await expect(readProse(referee)).toContainText("Written while the referee reads.");
  const moved = readProse(referee).getByText(/^moved · \d\d:\d\d$/);
  await expect(moved.first()).toBeVisible();
  await expect(referee.locator(".check-entry").first()).toContainText(/moved · \d\d:\d\d: was/);

  await Promise.all(answers);
  // Not the “bottom” of a style.
  const names = /wren|otto(?!m)/i;
  expect(sent.length).toBeGreaterThan(3);
  expect(sent.filter((text) => names.test(text))).toEqual([]);
  expect(await referee.content()).not.toMatch(names);
  expect(await referee.locator("body").ariaSnapshot()).not.toMatch(names);
});

declare global {
  interface Window {
    storeWrites: string[];
  }
}

/** Runs in the page before anything else: remembers every use of what outlives the page or reaches another tab. */
function watchStores(): void {
  window.storeWrites = [];
  const watch = (owner: object, name: string, what: string) => {
    const original: unknown = Reflect.get(owner, name);
    if (typeof original !== "function") throw new Error(`${what} is not here to be watched`);
    Reflect.set(owner, name, function (this: unknown, ...given: unknown[]) {
      window.storeWrites.push(what);
      return Reflect.apply(original, this, given) as unknown;
    });
  };
  watch(IDBFactory.prototype, "open", "indexedDB");
  watch(BroadcastChannel.prototype, "postMessage", "BroadcastChannel");
  watch(Storage.prototype, "setItem", "web storage");
  watch(navigator, "sendBeacon", "beacon");
}

/** Remembers everything that leaves the page, but for requests for files of the program itself. */
function watchNetwork(page: Page): { readonly left: readonly string[]; forget(): void } {
  const left: string[] = [];
  page.on("request", (request) => {
    const { pathname, protocol } = new URL(request.url());
    const isProgram = request.method() === "GET" && pathname.startsWith("/assets/");
    if (!isProgram && protocol !== "data:") left.push(`${request.method()} ${pathname}`);
  });
  page.on("websocket", (socket) => {
    left.push("a socket");
    socket.on("framesent", () => left.push("a frame on a socket"));
  });
  return { left, forget: () => left.splice(0) };
}

const axe = readFileSync(createRequire(import.meta.url).resolve("axe-core/axe.min.js"), "utf8");

/** Nothing that axe calls serious or critical. */
async function soundOn(page: Page): Promise<void> {
  await page.evaluate(axe);
  const found = await page.evaluate(async () => {
    const { axe: runner } = window as unknown as {
      axe: { run(): Promise<{ violations: { id: string; impact: string; nodes: { html: string }[] }[] }> };
    };
    return (await runner.run()).violations
      .filter(({ impact }) => impact === "serious" || impact === "critical")
      .map(({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html).join(" ")}`);
  });
  expect(found).toEqual([]);
}

function tokenOf(address: string): string {
  return new URL(address).pathname.split("/").at(-1) ?? "";
}

/** A sync frame: 0 asks with a state vector, 1 and 2 carry content. */
function frame(step: 0 | 1 | 2, bytes: Uint8Array): number[] {
  const encoder = encoding.createEncoder();
  encoding.writeVarUint(encoder, messageType.sync);
  encoding.writeVarUint(encoder, step);
  encoding.writeVarUint8Array(encoder, bytes);
  return [...encoding.toUint8Array(encoder)];
}
const stepOne = (document: Y.Doc) => frame(0, Y.encodeStateVector(document));

/** Takes in whatever content the frames carry. */
function apply(document: Y.Doc, frames: readonly (readonly number[])[]): void {
  for (const bytes of frames) {
    const decoder = decoding.createDecoder(Uint8Array.from(bytes));
    if (decoding.readVarUint(decoder) !== messageType.sync) continue;
    if (decoding.readVarUint(decoder) !== 0) Y.applyUpdate(document, decoding.readVarUint8Array(decoder));
  }
}

/** Opens a socket from within the visitor's own page, sends the frames, and listens until the last one is answered. */
async function drive(
  page: Page,
  address: string,
  frames: readonly (readonly number[])[],
): Promise<{ readonly received: number[][]; readonly closed: number | null }> {
  return await page.evaluate(
    async ({ address: to, frames: out }) =>
      await new Promise<{ received: number[][]; closed: number | null }>((resolve, reject) => {
        const received: number[][] = [];
        const socket = new WebSocket(to);
        socket.binaryType = "arraybuffer";
        socket.onopen = () => {
          for (const bytes of out) socket.send(Uint8Array.from(bytes));
        };
        socket.onmessage = ({ data }: MessageEvent<ArrayBuffer>) => {
          const bytes = [...new Uint8Array(data)];
          received.push(bytes);
          // Sync, step 2: the answer to step 1.
          if (bytes[0] !== 0 || bytes[1] !== 1) return;
          resolve({ received, closed: null });
          socket.close();
        };
        socket.onclose = ({ code }) => {
          resolve({ received, closed: code });
        };
        socket.onerror = () => {
          reject(new Error("the socket was refused"));
        };
      }),
    { address, frames },
  );
}
