import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import * as Y from "yjs";
import { closeCode, FRAGMENT } from "#contract/collab.ts";
import { SCHEMA_VERSION } from "#schema/version.ts";
import { connectionWords } from "../../../client/editor/connection-words.ts";
import {
  openNotebookSession,
  type NotebookSession,
  type SessionOptions,
} from "../../../client/editor/notebook-session.ts";
import { serverEnd, type ServerEnd } from "./fake-socket.ts";

let server: ServerEnd;
let session: NotebookSession;
let reloads: string[];
const wren = { id: "wren-id", name: "Wren" };

function open(options: Partial<SessionOptions> = {}): void {
  session = openNotebookSession({
    notebookId: "notebook-1",
    source: { mode: "member" },
    person: wren,
    role: "author",
    socket: server.Socket,
    onMustReload: (words) => reloads.push(words),
    ...options,
  });
}
async function openAndAccept(options: Partial<SessionOptions> = {}): Promise<void> {
  open(options);
  await vi.waitFor(() => {
    expect(server.addresses.length).toBeGreaterThan(0);
  });
  server.accept();
}
const words = () => connectionWords(session.state());
function typeOneLetter(): void {
  session.fragment.insert(0, [new Y.XmlElement("paragraph")]);
}

beforeEach(() => {
  server = serverEnd();
  reloads = [];
  localStorage.clear();
});
afterEach(() => {
  session.destroy();
  vi.unstubAllGlobals();
});

describe("opening a notebook", () => {
  it("shows nothing before the server has answered", async () => {
    open();
    expect(session.state()).toMatchObject({ loaded: false, phase: "opening" });
    await vi.waitFor(() => {
      expect(server.addresses.length).toBe(1);
    });
    expect(session.state().loaded).toBe(false);
    server.accept();
    expect(session.state()).toMatchObject({ loaded: true, phase: "connected" });
  });

  it("tells the server its schema version, and a referee's token", async () => {
    await openAndAccept({ source: { mode: "referee", token: "a/token" }, person: null, role: null });
    expect(server.addresses[0]).toContain("/collab/notebook-1?");
    expect(server.addresses[0]).toContain(`schema=${String(SCHEMA_VERSION)}`);
    expect(server.addresses[0]).toContain("referee=a%2Ftoken");
  });

  it("sends nothing from a scratch copy", async () => {
    open({ source: { mode: "scratch", ydoc: new Y.Doc() }, person: null, role: null });
    typeOneLetter();
    await Promise.resolve();
    expect(server.addresses).toEqual([]);
    expect(words()).toMatch(/scratch/);
  });
});

describe("what is said about saving", () => {
  it("follows the server's count", async () => {
    await openAndAccept();
    server.saved(1);
    expect(words()).toBe("all changes saved");
    typeOneLetter();
    expect(words()).toBe("saving…");
    server.saved(1);
    expect(words()).toBe("saving…");
    server.saved(2);
    expect(words()).toBe("all changes saved");
    expect(server.contentFrames()).toBe(2);
  });

  it("keeps what is typed offline and sends it on return", async () => {
    await openAndAccept();
    server.close(1006);
    expect(words()).toMatch(/offline/);
    typeOneLetter();
    expect(session.state().unsaved).toBe(true);
    await vi.waitFor(() => {
      expect(server.addresses.length).toBe(2);
    });
    server.accept();
    expect(server.doc.getXmlFragment(FRAGMENT).length).toBe(1);
    expect(words()).toBe("saving…");
    server.saved(1);
    expect(words()).toBe("all changes saved");
  });

  it("remembers over a reload that typing was not sent, until it is", async () => {
    await openAndAccept();
    server.close(1006);
    typeOneLetter();
    session.destroy();
    server = serverEnd();
    await openAndAccept();
    expect(session.state().unsaved).toBe(true);
    server.saved(1);
    expect(session.state().unsaved).toBe(false);
    session.destroy();
    server = serverEnd();
    open();
    expect(session.state().unsaved).toBe(false);
  });

  it("says when the store cannot be reached, and when it is back", async () => {
    await openAndAccept();
    server.notify({ about: "store-unreachable" });
    expect(words()).toMatch(/store cannot be reached/);
    server.notify({ about: "store-back" });
    server.saved(1);
    expect(words()).toBe("all changes saved");
  });
});

describe("someone who may only read", () => {
  it("sends no content, not even the answer to step 1, and shows no presence", async () => {
    await openAndAccept({ role: "reader" });
    typeOneLetter();
    expect(server.contentFrames()).toBe(0);
    expect(server.doc.getXmlFragment(FRAGMENT).length).toBe(0);
    expect(session.awareness.getLocalState()).toBeNull();
    expect(words()).toBe("reading only");
  });

  it("is made so in mid-work by a notice, and back again", async () => {
    await openAndAccept();
    server.saved(1);
    server.notify({ about: "read-only" });
    expect(session.state().readOnly).toBe(true);
    expect(session.awareness.getLocalState()).toBeNull();
    expect(reloads).toEqual([]);
    server.notify({ about: "writable" });
    expect(session.state().readOnly).toBe(false);
    expect(session.awareness.getLocalState()).toMatchObject({ user: wren });
  });

  it("starts afresh, with words, when typing was still under way", async () => {
    await openAndAccept();
    typeOneLetter();
    server.notify({ about: "read-only" });
    await vi.waitFor(() => {
      expect(reloads.length).toBe(1);
    });
    expect(reloads[0]).toMatch(/only read/);
  });
});

describe("refusals", () => {
  it("of an update give the local copy up and say why", async () => {
    await openAndAccept();
    server.notify({ about: "rejected", reason: "the notebook is archived" });
    await vi.waitFor(() => {
      expect(reloads).toEqual([expect.stringContaining("the notebook is archived")]);
    });
  });

  it.each([
    [closeCode.signedOut, "signed-out", /signed out/],
    [closeCode.forbidden, "forbidden", /no longer open/],
    [closeCode.notFound, "not-found", /no longer there/],
    [closeCode.schemaTooOld, "schema-too-old", /reload/],
    [closeCode.malformed, "refused", /reload/],
  ] as const)("with code %i are final: %s", async (code, phase, sentence) => {
    await openAndAccept();
    server.close(code);
    expect(session.state().phase).toBe(phase);
    expect(words()).toMatch(sentence);
    await new Promise((resolve) => setTimeout(resolve, 500));
    expect(server.addresses.length).toBe(1);
  });

  it("for an ended session keep typing that was not sent", async () => {
    await openAndAccept();
    typeOneLetter();
    server.close(closeCode.signedOut);
    expect(words()).toMatch(/kept on this device until you sign in again/);
    expect(
      Object.keys(localStorage).some((key) => key.startsWith("subleading.unsaved.wren-id.notebook-1")),
    ).toBe(true);
  });

  it.each([
    [401, "signed-out"],
    [404, "not-found"],
  ] as const)("before the socket opens are looked up: status %i means %s", async (status, phase) => {
    vi.stubGlobal("fetch", () => Promise.resolve(new Response(null, { status })));
    open();
    await vi.waitFor(() => {
      expect(server.addresses.length).toBe(1);
    });
    server.refuse();
    await vi.waitFor(() => {
      expect(session.state().phase).toBe(phase);
    });
  });

  it("without a network are no refusals: it goes on trying", async () => {
    vi.stubGlobal("fetch", () => Promise.reject(new TypeError("no network")));
    open();
    await vi.waitFor(() => {
      expect(server.addresses.length).toBe(1);
    });
    server.refuse();
    await vi.waitFor(() => {
      expect(server.addresses.length).toBe(2);
    });
    expect(session.state().phase).toBe("offline");
  });
});
