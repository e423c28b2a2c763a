import type { RefereeView } from "#contract/api.ts";
import type { ServerNotice } from "#contract/collab.ts";
import { act, cleanup, renderHook, screen, waitFor } from "@testing-library/react";
import { afterEach, beforeAll, beforeEach, describe, expect, it, vi } from "vitest";
import * as Y from "yjs";
import { FRAGMENT } from "#contract/collab.ts";
import { announceOpened } from "../../../client/editor/notebook-context.ts";
import type { NotebookEditorProps } from "../../../client/editor/notebook-editor.tsx";
import { openNotebookSession, type NotebookSession } from "../../../client/editor/notebook-session.ts";
import { FIELD_ORIGIN } from "../../../client/editor/history.ts";
import { useExpiryWatch } from "../../../client/pages/referee/until-expiry.ts";
import { openSite } from "../opened.tsx";
import { ok, refused, serve, signedOut, type Reply } from "../served.ts";
import { serverEnd, type ServerEnd } from "../editor/fake-socket.ts";

// The editor has tests of its own; here it opens the session it would open, over a socket that goes nowhere.
const handed: NotebookEditorProps[] = [];
let opened: NotebookSession | null = null;
let server: ServerEnd;
vi.mock("../../../client/editor/notebook-editor.tsx", async () => {
  const { useEffect } = await import("react");
  return {
    NotebookEditor: (props: NotebookEditorProps) => {
      handed.push(props);
      useEffect(() => {
        const { notebookId, source } = props;
        const session = openNotebookSession({
          notebookId,
          source,
          role: null,
          person: null,
          socket: server.Socket,
        });
        opened = session;
        announceOpened(session);
        return () => {
          announceOpened(null);
          session.destroy();
        };
      }, [props.source]);
      return <p>the editor</p>;
    },
  };
});

// The page fetches this when it is needed; the first test must not wait for it.
beforeAll(() => import("../../../client/pages/referee/referee-notebook.tsx"), 60_000);
beforeEach(() => {
  handed.length = 0;
  opened = null;
  server = serverEnd();
});
afterEach(() => {
  cleanup();
  vi.restoreAllMocks();
});

const token = "t".repeat(43);
const view: RefereeView = {
  notebookId: "00000000-0000-4000-8000-0000000000aa",
  title: "Lantern amplitude",
  authors: ["Wren Vale", "Otto Marsh"],
  schemaVersion: 1,
  expiresAt: "2099-03-03T14:00:00Z",
  results: [],
};
function openLink(part: Partial<RefereeView> = {}, answer: () => Reply = () => ok({ ...view, ...part })) {
  let now = answer;
  const requests = serve({ "GET /api/me": signedOut, [`GET /api/referee/${token}`]: () => now() });
  return {
    requests,
    answerFromNowOn: (next: () => Reply) => {
      now = next;
    },
    ...openSite(`/r/${token}`),
  };
}
const strip = () => screen.findByRole("region", { name: "About this page" });

describe("what a referee link opens", () => {
  it("hands the editor the token, no person and no role, and the version of the document", async () => {
    openLink({ schemaVersion: 7 });
    await screen.findByText("the editor");
    expect(handed.at(-1)).toMatchObject({
      notebookId: view.notebookId,
      source: { mode: "referee", token },
      role: null,
      schemaVersion: 7,
      stored: [],
    });
    expect(handed.at(-1)?.person ?? null).toBeNull();
    expect(screen.getByRole("heading", { level: 1 }).textContent).toBe("Lantern amplitude");
    expect(document.title).toBe("Lantern amplitude · Subleading");
  });

  it.each([
    [{}, /Written by Wren Vale and Otto Marsh\..*until 3 March 2099/],
    [{ expiresAt: null }, /until the authors close it/],
    [{ authors: null }, /Its authors are not named\./],
  ])("says who wrote it and until when: %j", async (part, words) => {
    openLink(part);
    const words_ = (await strip()).textContent;
    expect(words_).toMatch(/reading a live notebook, read-only/);
    expect(words_).toMatch(words);
  });

  it("names nobody when the authors are hidden", async () => {
    const { container } = openLink({ authors: null });
    await strip();
    expect(container.textContent).not.toMatch(/Wren|Otto|Written by/);
  });

  it.each([
    [404, "not-found", "No notebook is behind this link. Check that the address was copied whole."],
    [410, "gone", "The authors have closed this link. Ask them for a new one."],
    [410, "gone", "This link has expired. Ask the authors for a new one."],
  ])("says in plain words that it opens nothing: %i %s", async (status, code, sentence) => {
    openLink({}, () => refused(status, code, sentence));
    expect((await screen.findByRole("alert")).textContent).toBe(sentence);
    expect(screen.getByRole("heading", { level: 1 }).textContent).toBe("This link opens nothing");
    expect(handed).toEqual([]);
  });

  it("offers another try when the server stumbles, and takes it", async () => {
    const { user, answerFromNowOn } = openLink({}, () => refused(503, "unavailable", "Not just now."));
    expect((await screen.findByRole("alert")).textContent).toBe("Not just now.");
    answerFromNowOn(() => ok(view));
    await user.click(screen.getByRole("button", { name: "Try again" }));
    expect(await screen.findByText("the editor")).toBeDefined();
  });

  it.each<[ServerNotice, number]>([
    [{ about: "results" }, 1],
    [{ about: "notebook" }, 1],
    [{ about: "store-back" }, 0],
  ])("asks again when the server says %j", async (notice, more) => {
    const { requests } = openLink();
    await screen.findByText("the editor");
    const asked = () => requests.filter(({ path }) => path.startsWith("/api/referee")).length;
    const before = asked();
    act(() => handed.at(-1)?.onNotice?.(notice));
    await waitFor(() => {
      expect(asked()).toBe(before + more);
    });
  });

  it("says why when the link is closed while the page is open", async () => {
    const { answerFromNowOn } = openLink();
    await screen.findByText("the editor");
    const sentence = "The authors have closed this link. Ask them for a new one.";
    answerFromNowOn(() => refused(410, "gone", sentence));
    act(() => handed.at(-1)?.onNotice?.({ about: "notebook" }));
    await waitFor(() => {
      expect(screen.getByRole("alert").textContent).toBe(sentence);
    });
    expect(screen.queryByText("the editor")).toBeNull();
  });
});

describe("a scratch copy", () => {
  /** Opens the page on a document that has arrived, and takes a copy. */
  async function vary() {
    const page = openLink();
    await strip();
    await waitFor(() => {
      expect(server.addresses.length).toBe(1);
    });
    server.doc.getMap("inputs").set("Lambda", "3.2 TeV");
    expect(varyButton().disabled).toBe(true);
    act(() => {
      server.accept();
    });
    await waitFor(() => {
      expect(varyButton().disabled).toBe(false);
    });
    const live = opened ?? expect.fail("no notebook is open");
    await page.user.click(varyButton());
    await screen.findByRole("region", { name: "Scratch copy" });
    await waitFor(() => {
      expect(opened?.source.mode).toBe("scratch");
    });
    const source = handed.at(-1)?.source;
    if (source?.mode !== "scratch") throw new Error("the editor was given no copy");
    return { ...page, live, copy: source.ydoc };
  }
  const varyButton = () =>
    screen.getByRole<HTMLButtonElement>("button", { name: "Vary the inputs in a scratch copy" });
  const discard = () => screen.getByRole("button", { name: "Discard the scratch copy" });
  const paragraphs = (doc: Y.Doc) => doc.getXmlFragment(FRAGMENT).length;
  const change = (doc: Y.Doc) => {
    act(() => {
      doc.transact(() => doc.getXmlFragment(FRAGMENT).push([new Y.XmlElement("paragraph")]), FIELD_ORIGIN);
    });
  };

  it("holds what the notebook held, and nothing typed in it reaches the notebook, a socket or a store", async () => {
    const databases = vi.fn();
    vi.stubGlobal("indexedDB", new Proxy({}, { get: databases }));
    const channels = vi.fn();
    vi.stubGlobal("BroadcastChannel", channels);
    const { live, copy, requests } = await vary();
    expect(copy).not.toBe(live.ydoc);
    expect(copy.getMap("inputs").get("Lambda")).toBe("3.2 TeV");
    expect(server.isOpen()).toBe(false);
    const [asked, sockets, sent] = [requests.length, server.addresses.length, server.contentFrames()];
    change(copy);
    expect([paragraphs(copy), paragraphs(server.doc), paragraphs(live.ydoc)]).toEqual([1, 0, 0]);
    expect([requests.length, server.addresses.length, server.contentFrames()]).toEqual([
      asked,
      sockets,
      sent,
    ]);
    expect(databases).not.toHaveBeenCalled();
    expect(channels).not.toHaveBeenCalled();
    vi.unstubAllGlobals();
  });

  it("says that it is one, and takes the focus there", async () => {
    await vary();
    const words = screen.getByText(/Nothing you change here is sent or kept/);
    expect(document.activeElement).toBe(words);
  });

  it("is discarded without a question when nothing was changed", async () => {
    const { user } = await vary();
    await user.click(discard());
    await strip();
    expect(screen.queryByRole("dialog")).toBeNull();
    await waitFor(() => {
      expect(server.addresses.length).toBe(2);
    });
    expect(handed.at(-1)?.source).toEqual({ mode: "referee", token });
  });

  it("asks first when something was changed, and keeps the copy when told so", async () => {
    const { user, copy } = await vary();
    change(copy);
    await user.click(discard());
    await user.click(await screen.findByRole("button", { name: "Keep it as it is" }));
    expect(screen.getByRole("region", { name: "Scratch copy" })).toBeDefined();
    await user.click(discard());
    await user.click(await screen.findByRole("button", { name: "Discard the copy" }));
    await strip();
    expect(handed.at(-1)?.source).toEqual({ mode: "referee", token });
  });
});

describe("the watch on a link's time", () => {
  beforeEach(() => {
    vi.useFakeTimers({ now: new Date("2026-12-01T12:00:00Z") });
  });
  afterEach(() => {
    vi.useRealTimers();
  });
  const days = (count: number) => count * 86_400_000;
  function watch(expiresAt: string | null) {
    const expired = vi.fn();
    const { unmount } = renderHook(() => {
      useExpiryWatch(expiresAt, expired);
    });
    return { expired, unmount };
  }

  it("calls once when the time is up, also when that is further off than a timer reaches", () => {
    const { expired } = watch("2027-02-01T12:00:00Z");
    vi.advanceTimersByTime(days(62) - 1);
    expect(expired).not.toHaveBeenCalled();
    vi.advanceTimersByTime(2);
    vi.advanceTimersByTime(days(100));
    expect(expired).toHaveBeenCalledTimes(1);
  });
  it.each([
    ["a link without an end", null],
    ["a time that this device's clock is already past", "2026-12-01T11:00:00Z"],
  ])("never calls for %s", (_what, expiresAt) => {
    const { expired } = watch(expiresAt);
    vi.advanceTimersByTime(days(400));
    expect(expired).not.toHaveBeenCalled();
  });
  it("stops with the page", () => {
    const { expired, unmount } = watch("2026-12-02T12:00:00Z");
    unmount();
    vi.advanceTimersByTime(days(2));
    expect(expired).not.toHaveBeenCalled();
  });
});
