import type { Notebook } from "#contract/api.ts";
import type { ServerNotice } from "#contract/collab.ts";
import type { Role } from "#contract/roles.ts";
import { act, cleanup, screen, waitFor } from "@testing-library/react";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { setSessionLapsed } from "../../../client/api/session-state.ts";
import type { NotebookEditorProps } from "../../../client/editor/notebook-editor.tsx";
import { sayPins } from "../../../client/pages/notebook/pins-to-look-at.tsx";
import { openSite } from "../opened.tsx";
import { ok, refused, serve, signedIn, signedOut, wren, type Lines } from "../served.ts";

// The editor has tests of its own; here it only shows what the frame hands it.
const handed: NotebookEditorProps[] = [];
let mounts = 0;
vi.mock("../../../client/editor/notebook-editor.tsx", async () => {
  const { useEffect } = await import("react");
  return {
    NotebookEditor: (props: NotebookEditorProps) => {
      handed.push(props);
      useEffect(() => {
        mounts += 1;
      }, []);
      return <p>the editor</p>;
    },
  };
});

beforeEach(() => {
  setSessionLapsed(false);
  handed.length = 0;
  mounts = 0;
});
afterEach(() => {
  cleanup();
  vi.restoreAllMocks();
});

const id = "00000000-0000-4000-8000-0000000000aa";
function openNotebook(part: Partial<Notebook> = {}, more: Lines = {}) {
  const notebook: Notebook = {
    id,
    title: "Lantern amplitude",
    role: "owner",
    schemaVersion: 1,
    people: [wren],
    archivedAt: null,
    ...part,
  };
  const requests = serve({
    "GET /api/me": signedIn,
    [`GET /api/notebooks/${id}`]: () => ok(notebook),
    [`GET /api/notebooks/${id}/results`]: () => ok({ results: [] }),
    ...more,
  });
  return { requests, ...openSite(`/notebooks/${id}`) };
}
const titleField = () => screen.queryByLabelText("Title of the notebook");

describe("the frame of a notebook", () => {
  it("hands the editor the notebook, the person and the role", async () => {
    openNotebook({ role: "author", schemaVersion: 3 });
    await screen.findByText("the editor");
    expect(handed.at(-1)).toMatchObject({
      notebookId: id,
      source: { mode: "member" },
      role: "author",
      person: { id: wren.id, name: wren.name },
      schemaVersion: 3,
    });
    await waitFor(() => {
      expect(handed.at(-1)?.stored).toEqual([]);
    });
    expect(document.title).toBe("Lantern amplitude · Subleading");
    expect(screen.getByRole("link", { name: "Sharing" }).getAttribute("href")).toBe(
      `/notebooks/${id}/sharing`,
    );
  });

  it.each<[Role, string | null, boolean]>([
    ["owner", null, true],
    ["author", null, true],
    ["reviewer", null, false],
    ["reader", null, false],
    ["owner", "2026-11-20T09:00:00Z", false],
  ])("lets the %s of a notebook archived at %s change its title: %s", async (role, archivedAt, may) => {
    openNotebook({ role, archivedAt });
    expect((await screen.findByRole("heading", { level: 1 })).textContent).toBe(
      may ? "" : "Lantern amplitude",
    );
    expect(titleField() !== null).toBe(may);
    expect(screen.queryByText("archived: reading only") !== null).toBe(archivedAt !== null);
  });

  it("keeps a new title with Enter, the old one with Escape, and never an empty one", async () => {
    const { requests, user } = openNotebook({}, { [`PATCH /api/notebooks/${id}`]: () => ok({}) });
    await screen.findByText("the editor");
    const field = screen.getByLabelText("Title of the notebook");
    const patches = () => requests.filter(({ method }) => method === "PATCH").map(({ body }) => body);
    await user.clear(field);
    await user.type(field, "Else{Escape}");
    expect(field).toHaveProperty("value", "Lantern amplitude");
    await user.clear(field);
    await user.tab();
    expect(await screen.findByText(/needs a title/)).toBeDefined();
    expect(patches()).toEqual([]);
    await user.clear(field);
    await user.type(field, "Else{Enter}");
    await waitFor(() => {
      expect(patches()).toEqual([{ title: "Else" }]);
    });
  });

  it("puts the old title back and says why when the new one is refused", async () => {
    const { user } = openNotebook(
      {},
      { [`PATCH /api/notebooks/${id}`]: () => refused(409, "archived", "The notebook is archived.") },
    );
    const field = await screen.findByLabelText("Title of the notebook");
    await user.clear(field);
    await user.type(field, "Else{Enter}");
    expect(await screen.findByText("The notebook is archived.")).toBeDefined();
    expect(field).toHaveProperty("value", "Lantern amplitude");
  });

  it("says so when the notebook is not open to the person", async () => {
    serve({ "GET /api/me": signedIn });
    openSite(`/notebooks/${id}`);
    expect(await screen.findByRole("heading", { name: "This notebook is not open to you" })).toBeDefined();
    expect(handed).toEqual([]);
  });

  it.each<[ServerNotice, readonly string[]]>([
    [{ about: "results" }, [`/api/notebooks/${id}/results`]],
    [{ about: "notebook" }, [`/api/notebooks/${id}`]],
    [{ about: "read-only" }, [`/api/notebooks/${id}`]],
    [{ about: "store-back" }, []],
  ])("fetches again what the server says has changed: %j", async (notice, paths) => {
    const { requests } = openNotebook();
    await screen.findByText("the editor");
    await waitFor(() => {
      expect(handed.at(-1)?.stored).toEqual([]);
    });
    const before = requests.length;
    act(() => handed.at(-1)?.onNotice?.(notice));
    await waitFor(() => {
      expect(requests.slice(before).map(({ path }) => path)).toEqual(paths);
    });
  });

  it("stays when the session ends, and opens the editor afresh when the person is back", async () => {
    let present = true;
    const { client } = openNotebook({}, { "GET /api/me": () => (present ? signedIn() : signedOut()) });
    await screen.findByText("the editor");
    expect(mounts).toBe(1);
    present = false;
    await act(() => client.refetchQueries({ queryKey: ["me"] }));
    expect(await screen.findByText(/You are signed out. What you typed is kept here./)).toBeDefined();
    expect(screen.getByText("the editor")).toBeDefined();
    expect(mounts).toBe(1);
    present = true;
    await act(() => client.refetchQueries({ queryKey: ["me"] }));
    await waitFor(() => {
      expect(mounts).toBe(2);
    });
  });
});

describe("pins to look at", () => {
  it.each([
    [0, 0, ""],
    [1, 0, "pin: 1 moved"],
    [2, 0, "pins: 2 moved"],
    [1, 1, "pins: 1 moved, 1 loose"],
    [0, 1, "pin: 1 loose"],
  ])("%i moved and %i loose are said as “%s”", (moved, loose, words) => {
    expect(sayPins(moved, loose)).toBe(words);
  });
});
