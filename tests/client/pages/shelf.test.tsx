import type { NotebookRow } from "#contract/api.ts";
import type { Role } from "#contract/roles.ts";
import { cleanup, screen, waitFor, within } from "@testing-library/react";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { setSessionLapsed } from "../../../client/api/session-state.ts";
import { readShelfView, wholeShelf, writeShelfView } from "../../../client/pages/shelf/shelf-view.ts";
import { sayPeople } from "../../../client/pages/shelf/shelf-table.tsx";
import { openSite } from "../opened.tsx";
import { done, ok, refused, serve, signedIn, signedOut, type Lines } from "../served.ts";

beforeEach(() => {
  setSessionLapsed(false);
});
afterEach(() => {
  cleanup();
  vi.restoreAllMocks();
});

const id = "00000000-0000-4000-8000-0000000000aa";
function row(part: Partial<NotebookRow> = {}): NotebookRow {
  return {
    id,
    title: "Lantern amplitude",
    role: "owner",
    lastChangedAt: "2026-11-12T09:00:00Z",
    lastChangedBy: "Otto Lind",
    people: ["Wren Vale", "Otto Lind"],
    premisesLine: "d = 4 · 2 fields · 11 terms",
    pinsMoved: 2,
    pinsLoose: 1,
    archivedAt: null,
    deletedAt: null,
    excerpt: null,
    ...part,
  };
}
function shelfOf(notebooks: readonly NotebookRow[], more: Lines = {}) {
  return serve({
    "GET /api/me": signedIn,
    "GET /api/notebooks": () => ok({ notebooks, nextCursor: null }),
    ...more,
  });
}
async function chooseAction(user: ReturnType<typeof openSite>["user"], action: string) {
  await user.click(await screen.findByRole("button", { name: /^Actions for/ }));
  await user.click(await screen.findByRole("menuitem", { name: action }));
}

describe("the shelf", () => {
  it("tells of each notebook what a person looks for", async () => {
    shelfOf([row()]);
    openSite("/shelf");
    const entry = await screen.findByRole("row", { name: /Lantern amplitude/ });
    expect(within(entry).getByRole("link", { name: "Lantern amplitude" }).getAttribute("href")).toBe(
      `/notebooks/${id}`,
    );
    for (const words of [
      "d = 4 · 2 fields · 11 terms",
      "12 Nov 2026",
      "by Otto Lind",
      "Wren Vale, Otto Lind",
      "2 moved, 1 loose",
      "owner",
    ])
      expect(entry.textContent).toContain(words);
    expect(document.title).toBe("Shelf · Subleading");
  });

  it("stands at the first address too for one who is signed in", async () => {
    shelfOf([row()]);
    openSite("/");
    expect(await screen.findByRole("heading", { name: "Shelf" })).toBeDefined();
  });

  it.each([
    ["/shelf", /The shelf is empty/],
    ["/shelf?search=tern", /Nothing here matches “tern”/],
    ["/shelf?attention=moved", /No pin asks for attention/],
    ["/shelf?show=archived", /Nothing is archived/],
  ])("says why it is empty at %s", async (address, words) => {
    shelfOf([]);
    openSite(address);
    expect(await screen.findByText(words)).toBeDefined();
  });

  it("searches after a pause and keeps the view in the address", async () => {
    const requests = shelfOf([row()]);
    const { user, place } = openSite("/shelf");
    await user.type(await screen.findByRole("searchbox"), "tern");
    await waitFor(() => {
      expect(place()).toBe("/shelf?search=tern");
    });
    const asked = requests
      .filter(({ path }) => path === "/api/notebooks")
      .map(({ query }) => query.get("search"));
    expect(asked).toEqual(["", "tern"]);
    expect(document.activeElement).toBe(screen.getByRole("searchbox"));
  });

  it("takes over a search that the address changed from elsewhere", async () => {
    shelfOf([]);
    const { user, place } = openSite("/shelf?search=tern");
    await user.click(await screen.findByRole("button", { name: "Clear the search" }));
    await waitFor(() => {
      expect(place()).toBe("/shelf");
    });
    expect(screen.getByRole("searchbox")).toHaveProperty("value", "");
  });

  it("asks the server to filter and sort", async () => {
    const requests = shelfOf([row()]);
    const { user } = openSite("/shelf");
    await user.selectOptions(await screen.findByLabelText("Sort by"), "title");
    await user.selectOptions(screen.getByLabelText("Show"), "archived");
    await user.click(screen.getByLabelText("Only with pins to look at"));
    await waitFor(() => {
      expect(Object.fromEntries(requests.at(-1)?.query ?? [])).toEqual({
        search: "",
        show: "archived",
        attention: "moved",
        sort: "title",
      });
    });
  });

  it("reads on where the first page ended", async () => {
    serve({
      "GET /api/me": signedIn,
      "GET /api/notebooks": ({ query }) =>
        query.get("cursor") === "next"
          ? ok({ notebooks: [row({ id: id.replace("aa", "bb"), title: "Tern trap" })], nextCursor: null })
          : ok({ notebooks: [row()], nextCursor: "next" }),
    });
    const { user } = openSite("/shelf");
    await user.click(await screen.findByRole("button", { name: "Show more" }));
    expect(await screen.findByRole("link", { name: "Tern trap" })).toBeDefined();
    expect(screen.getByRole("link", { name: "Lantern amplitude" })).toBeDefined();
    expect(screen.queryByRole("button", { name: "Show more" })).toBeNull();
  });

  it("goes from title to title with the arrow keys", async () => {
    shelfOf([row(), row({ id: id.replace("aa", "bb"), title: "Tern trap" })]);
    const { user } = openSite("/shelf");
    (await screen.findByRole("link", { name: "Lantern amplitude" })).focus();
    await user.keyboard("{ArrowDown}");
    expect(document.activeElement?.textContent).toBe("Tern trap");
    await user.keyboard("{Home}");
    expect(document.activeElement?.textContent).toBe("Lantern amplitude");
  });

  it("says in the server's words why it could not be read, and tries again", async () => {
    let broken = true;
    serve({
      "GET /api/me": signedIn,
      "GET /api/notebooks": () =>
        broken
          ? refused(503, "unavailable", "The database cannot be reached.")
          : ok({ notebooks: [row()], nextCursor: null }),
    });
    const { user } = openSite("/shelf");
    expect(
      (await screen.findByText("The database cannot be reached.")).closest("[role=alert]"),
    ).not.toBeNull();
    broken = false;
    await user.click(screen.getByRole("button", { name: "Try again" }));
    expect(await screen.findByRole("link", { name: "Lantern amplitude" })).toBeDefined();
  });
});

describe("what may be done from the shelf", () => {
  it.each<[Role, string | null, readonly string[]]>([
    ["owner", null, ["Sharing", "Duplicate", "Rename", "Archive", "Delete"]],
    ["owner", "2026-11-20T09:00:00Z", ["Sharing", "Duplicate", "Restore", "Delete"]],
    ["author", null, ["Sharing", "Duplicate", "Rename"]],
    ["reviewer", null, ["Sharing", "Duplicate"]],
    ["reader", null, ["Sharing", "Duplicate"]],
  ])("by the %s of a notebook archived at %s: %j", async (role, archivedAt, actions) => {
    shelfOf([row({ role, archivedAt })]);
    const { user } = openSite("/shelf");
    await user.click(await screen.findByRole("button", { name: "Actions for “Lantern amplitude”" }));
    const items = await screen.findAllByRole("menuitem");
    expect(items.map((item) => item.textContent)).toEqual(actions);
  });

  it("makes a notebook from the demonstration and opens it", async () => {
    const requests = shelfOf([], {
      "POST /api/notebooks": () =>
        ok({ id, title: "Mine", role: "owner", schemaVersion: 1, people: [], archivedAt: null }),
    });
    const { user, place } = openSite("/shelf");
    await user.click((await screen.findAllByRole("button", { name: "New notebook" }))[0] as HTMLElement); // One in the head, one in the empty shelf.
    await user.type(await screen.findByLabelText("Title"), "Mine");
    await user.click(screen.getByLabelText("A copy of the Lantern demonstration"));
    await user.click(screen.getByRole("button", { name: "Make the notebook" }));
    await waitFor(() => {
      expect(place()).toBe(`/notebooks/${id}`);
    });
    expect(requests.find(({ method }) => method === "POST")?.body).toEqual({
      title: "Mine",
      template: "lantern",
    });
  });

  it("renames, and gives the focus back to where one was", async () => {
    const requests = shelfOf([row()], { [`PATCH /api/notebooks/${id}`]: () => ok({}) });
    const { user } = openSite("/shelf");
    await chooseAction(user, "Rename");
    const field = await screen.findByLabelText("Title");
    await user.clear(field);
    expect(screen.getByText("A notebook needs a title.")).toBeDefined();
    await user.type(field, "Lantern again{Enter}");
    await waitFor(() => {
      expect(screen.queryByRole("dialog")).toBeNull();
    });
    await waitFor(() => {
      expect(document.activeElement?.textContent).toBe("Actions");
    });
    expect(requests.find(({ method }) => method === "PATCH")?.body).toEqual({ title: "Lantern again" });
  });

  it("archives at once and says so", async () => {
    const requests = shelfOf([row()], { [`PATCH /api/notebooks/${id}`]: () => ok({}) });
    const { user } = openSite("/shelf");
    await chooseAction(user, "Archive");
    expect(await screen.findByText(/“Lantern amplitude” is archived/)).toBeDefined();
    expect(requests.find(({ method }) => method === "PATCH")?.body).toEqual({ archived: true });
  });

  it("deletes only after asking", async () => {
    const requests = shelfOf([row()], { [`DELETE /api/notebooks/${id}`]: () => done });
    const { user } = openSite("/shelf");
    await chooseAction(user, "Delete");
    const dialog = await screen.findByRole("dialog", { name: "Delete “Lantern amplitude”?" });
    expect(dialog.textContent).toContain("bring it back for 30 days");
    expect(document.activeElement?.textContent).toBe("Keep it as it is");
    expect(requests.some(({ method }) => method === "DELETE")).toBe(false);
    await user.click(within(dialog).getByRole("button", { name: "Delete the notebook" }));
    await waitFor(() => {
      expect(requests.some(({ method }) => method === "DELETE")).toBe(true);
    });
  });

  it("keeps the question open and says why when a deletion is refused", async () => {
    shelfOf([row()], {
      [`DELETE /api/notebooks/${id}`]: () => refused(403, "forbidden", "Your role does not allow this."),
    });
    const { user } = openSite("/shelf");
    await chooseAction(user, "Delete");
    await user.click(await screen.findByRole("button", { name: "Delete the notebook" }));
    const dialog = await screen.findByRole("dialog");
    expect(await within(dialog).findByText("Your role does not allow this.")).toBeDefined();
  });
});

describe("one who is not signed in", () => {
  it("is shown the way in, and comes back to the same view", async () => {
    serve({ "GET /api/me": signedOut });
    openSite("/shelf?search=tern");
    const link = await screen.findByRole("link", { name: "Sign in with GitHub" });
    expect(link.getAttribute("href")).toBe(`/auth/github?next=${encodeURIComponent("/shelf?search=tern")}`);
  });

  it("keeps the page when the session ends on it, and is told", async () => {
    let present = true;
    serve({
      "GET /api/me": () => (present ? signedIn() : signedOut()),
      "GET /api/notebooks": () =>
        present
          ? ok({ notebooks: [row()], nextCursor: null })
          : refused(401, "signed-out", "Sign in and try again."),
    });
    const { client } = openSite("/shelf");
    await screen.findByRole("link", { name: "Lantern amplitude" });
    present = false;
    await client.refetchQueries({ queryKey: ["shelf"] });
    await client.refetchQueries({ queryKey: ["me"] });
    expect(await screen.findByText(/You are signed out/)).toBeDefined();
    expect(screen.getByRole("link", { name: "Sign in again" }).getAttribute("href")).toBe(
      "/auth/github?next=%2Fshelf",
    );
    expect(screen.getByRole("link", { name: "Lantern amplitude" })).toBeDefined();
    present = true;
    await client.refetchQueries({ queryKey: ["me"] });
    await waitFor(() => {
      expect(screen.queryByText(/You are signed out/)).toBeNull();
    });
  });
});

describe("the view in the address", () => {
  it.each(["", "search=tern+trap", "show=archived&sort=title", "attention=moved"])(
    "survives reading and writing: %s",
    (query) => {
      expect(new URLSearchParams(writeShelfView(readShelfView(new URLSearchParams(query)))).toString()).toBe(
        query,
      );
    },
  );
  it("takes nonsense for the whole shelf", () => {
    expect(readShelfView(new URLSearchParams("show=everything&sort=size&attention=2"))).toEqual(wholeShelf);
  });
});

describe("the people of a notebook", () => {
  it.each([
    [["A", "B", "C"], "A, B, C"],
    [["A", "B", "C", "D", "E"], "A, B, C and 2 more"],
  ])("%j are said as %s", (people, said) => {
    expect(sayPeople(people)).toBe(said);
  });
});
