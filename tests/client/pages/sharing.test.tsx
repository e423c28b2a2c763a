import type { NotebookPeople, RefereeLink } from "#contract/api.ts";
import type { Role } from "#contract/roles.ts";
import { cleanup, screen, waitFor, within } from "@testing-library/react";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { setSessionLapsed } from "../../../client/api/session-state.ts";
import { expiryOf } from "../../../client/pages/sharing/expiry.ts";
import { stateOf } from "../../../client/pages/sharing/referee-link-entry.tsx";
import { openSite } from "../opened.tsx";
import { done, ok, refused, serve, signedIn, wren, type Lines } from "../served.ts";

beforeEach(() => {
  setSessionLapsed(false);
});
afterEach(() => {
  cleanup();
  vi.restoreAllMocks();
});

const id = "00000000-0000-4000-8000-0000000000aa";
const otto = { id: "00000000-0000-4000-8000-000000000002", login: "otto-demo", name: "Otto Lind" };
const since = "2026-10-02T09:00:00Z";
const link: RefereeLink = {
  id: "00000000-0000-4000-8000-0000000000cc",
  name: "journal, first round",
  hideAuthors: true,
  createdAt: since,
  expiresAt: null,
  revokedAt: null,
  lastOpenedAt: null,
};

/** The sharing page of a notebook in which Wren has this role, beside Otto the author. */
function sharingAs(role: Role, more: Lines = {}, invitations: NotebookPeople["invitations"] = []) {
  const people = [
    { ...wren, role, since },
    { ...otto, role: "author" as const, since },
  ];
  const requests = serve({
    "GET /api/me": signedIn,
    [`GET /api/notebooks/${id}`]: () =>
      ok({ id, title: "Lantern amplitude", role, schemaVersion: 1, people, archivedAt: null }),
    [`GET /api/notebooks/${id}/people`]: () => ok({ people, invitations }),
    [`GET /api/notebooks/${id}/referee-links`]: () => ok([link]),
    ...more,
  });
  return { requests, ...openSite(`/notebooks/${id}/sharing`) };
}
const sent = (requests: ReturnType<typeof serve>, method: string) =>
  requests.find((asked) => asked.method === method);

describe("the sharing page", () => {
  it.each<[Role, readonly string[]]>([
    ["owner", ["People", "Invite", "Referee links"]],
    ["author", ["People", "Leave"]],
    ["reviewer", ["People", "Leave"]],
    ["reader", ["People", "Leave"]],
  ])("offers the %s what the role allows: %j", async (role, parts) => {
    const { requests } = sharingAs(role);
    await screen.findByText("Otto Lind");
    expect(screen.getAllByRole("heading", { level: 2 }).map((part) => part.textContent)).toEqual(parts);
    expect(requests.some(({ path }) => path.endsWith("referee-links"))).toBe(role === "owner");
    expect(screen.queryAllByRole("combobox", { name: /^Role of/ })).toHaveLength(role === "owner" ? 2 : 0);
    expect(document.title).toBe("Sharing “Lantern amplitude” · Subleading");
  });

  it("says so when the notebook is not open to the person", async () => {
    serve({ "GET /api/me": signedIn });
    openSite(`/notebooks/${id}/sharing`);
    expect(await screen.findByRole("heading", { name: "This notebook is not open to you" })).toBeDefined();
  });
});

describe("people", () => {
  it("get another role at once", async () => {
    const { requests, user } = sharingAs("owner", {
      [`PUT /api/notebooks/${id}/people/${otto.id}`]: () => done,
    });
    await user.selectOptions(await screen.findByLabelText("Role of Otto Lind"), "reviewer");
    expect(await screen.findByText("Otto Lind is now reviewer.")).toBeDefined();
    expect(sent(requests, "PUT")?.body).toEqual({ role: "reviewer" });
  });

  it("are asked before they give up their own ownership, and hear why they cannot", async () => {
    const { requests, user } = sharingAs("owner", {
      [`PUT /api/notebooks/${id}/people/${wren.id}`]: () =>
        refused(409, "last-owner", "A notebook needs an owner. Make someone else owner first."),
    });
    await user.selectOptions(await screen.findByLabelText("Role of Wren Vale"), "reader");
    const dialog = await screen.findByRole("dialog", { name: "Change your own role?" });
    expect(sent(requests, "PUT")).toBeUndefined();
    await user.click(within(dialog).getByRole("button", { name: "Change my role" }));
    expect(
      await within(dialog).findByText("A notebook needs an owner. Make someone else owner first."),
    ).toBeDefined();
  });

  it("are removed only after asking", async () => {
    const { requests, user } = sharingAs("owner", {
      [`DELETE /api/notebooks/${id}/people/${otto.id}`]: () => done,
    });
    await user.click(await screen.findByRole("button", { name: "Remove Otto Lind" }));
    const dialog = await screen.findByRole("dialog", { name: "Remove Otto Lind?" });
    expect(sent(requests, "DELETE")).toBeUndefined();
    await user.click(within(dialog).getByRole("button", { name: "Remove" }));
    expect(await screen.findByText("Otto Lind no longer takes part.")).toBeDefined();
  });

  it("leave, and are back at the shelf", async () => {
    const { user, place } = sharingAs("reader", {
      [`DELETE /api/notebooks/${id}/people/${wren.id}`]: () => done,
      "GET /api/notebooks": () => ok({ notebooks: [], nextCursor: null }),
    });
    await user.click(await screen.findByRole("button", { name: "Leave this notebook" }));
    await user.click(await screen.findByRole("button", { name: "Leave" }));
    await waitFor(() => {
      expect(place()).toBe("/shelf");
    });
  });
});

describe("an invitation", () => {
  it("is not sent to nobody", async () => {
    const { requests, user } = sharingAs("owner");
    await user.click(await screen.findByRole("button", { name: "Invite" }));
    const field = screen.getByLabelText("Account name or e-mail address");
    expect(field.getAttribute("aria-invalid")).toBe("true");
    expect(await screen.findByText(/Type the account name/)).toBeDefined();
    expect(sent(requests, "POST")).toBeUndefined();
  });

  it.each([
    [{ outcome: "added", person: otto }, "Otto Lind takes part from now on, as reviewer."],
    [
      { outcome: "invited", invitation: { id: "i", to: "otto-demo", role: "reviewer", invitedAt: since } },
      "otto-demo is invited, and joins on signing in.",
    ],
  ])("says what came of it: %j", async (outcome, words) => {
    const { requests, user } = sharingAs("owner", {
      [`POST /api/notebooks/${id}/invitations`]: () => ok(outcome),
    });
    await user.type(await screen.findByLabelText("Account name or e-mail address"), " otto-demo ");
    await user.selectOptions(screen.getByLabelText("Role"), "reviewer");
    expect(screen.getByText(/^Reviewer: reads everything/)).toBeDefined();
    await user.click(screen.getByRole("button", { name: "Invite" }));
    expect(await screen.findByText(words)).toBeDefined();
    expect(sent(requests, "POST")?.body).toEqual({ to: "otto-demo", role: "reviewer" });
  });

  it("that waits is listed and can be withdrawn", async () => {
    const waiting = { id: "i", to: "ida@example.test", role: "reader" as const, invitedAt: since };
    const { user } = sharingAs("owner", { [`DELETE /api/notebooks/${id}/invitations/i`]: () => done }, [
      waiting,
    ]);
    await user.click(
      await screen.findByRole("button", { name: "Withdraw the invitation of ida@example.test" }),
    );
    expect(await screen.findByText("The invitation of ida@example.test is withdrawn.")).toBeDefined();
  });
});

describe("a referee link", () => {
  it("needs a name before it is made", async () => {
    const { requests, user } = sharingAs("owner");
    await user.click(await screen.findByRole("button", { name: "Make the link" }));
    expect(await screen.findByText(/Give the link a name/)).toBeDefined();
    expect(sent(requests, "POST")).toBeUndefined();
  });

  it("shows its address once", async () => {
    const { requests, user } = sharingAs("owner", {
      [`POST /api/notebooks/${id}/referee-links`]: () =>
        ok({ link: { ...link, id: "new", name: "second" }, token: "tok-123" }),
    });
    await user.type(await screen.findByLabelText("Name of a new link"), "second");
    await user.selectOptions(screen.getByLabelText("Expires"), "never");
    await user.click(screen.getByLabelText("Hide the authors"));
    await user.click(screen.getByRole("button", { name: "Make the link" }));
    const address = await screen.findByLabelText("Address of “second”");
    expect(address).toHaveProperty("value", `${window.location.origin}/r/tok-123`);
    expect(document.activeElement).toBe(address);
    expect(sent(requests, "POST")?.body).toEqual({ name: "second", expiresAt: null, hideAuthors: true });
    await user.click(screen.getByRole("button", { name: "Hide the address" }));
    expect(document.body.innerHTML).not.toContain("tok-123");
  });

  it("is copied, or selected for the person's hand when the browser does not let the page copy", async () => {
    const { user } = sharingAs("owner", {
      [`POST /api/notebooks/${id}/referee-links`]: () =>
        ok({ link: { ...link, id: "new", name: "second" }, token: "tok-123" }),
    });
    await user.type(await screen.findByLabelText("Name of a new link"), "second");
    await user.click(screen.getByRole("button", { name: "Make the link" }));
    await user.click(await screen.findByRole("button", { name: "Copy" }));
    expect(await screen.findByText("Copied.")).toBeDefined();
    expect(await navigator.clipboard.readText()).toBe(`${window.location.origin}/r/tok-123`);
    vi.spyOn(navigator.clipboard, "writeText").mockRejectedValue(new DOMException("no", "NotAllowedError"));
    await user.click(screen.getByRole("button", { name: "Copy" }));
    expect(await screen.findByText(/copy it with your keyboard/)).toBeDefined();
  });

  it("is revoked only after asking", async () => {
    const { requests, user } = sharingAs("owner", {
      [`DELETE /api/notebooks/${id}/referee-links/${link.id}`]: () => ok({ ...link, revokedAt: since }),
    });
    await user.click(await screen.findByRole("button", { name: "Revoke the link “journal, first round”" }));
    expect(sent(requests, "DELETE")).toBeUndefined();
    await user.click(await screen.findByRole("button", { name: "Revoke the link" }));
    expect(await screen.findByText("“journal, first round” no longer opens anything.")).toBeDefined();
  });

  const now = new Date("2026-12-01T12:00:00Z");
  it.each([
    ["open", { expiresAt: null, revokedAt: null }],
    ["open", { expiresAt: "2026-12-01T12:00:01Z", revokedAt: null }],
    ["expired", { expiresAt: "2026-12-01T12:00:00Z", revokedAt: null }],
    ["revoked", { expiresAt: "2026-11-01T12:00:00Z", revokedAt: "2026-11-20T12:00:00Z" }],
  ] as const)("is %s with %j at noon of 1 December", (state, dates) => {
    expect(stateOf(dates, now)).toBe(state);
  });

  it.each([
    ["never", "", null],
    ["30", "", "2026-12-31T12:00:00.000Z"],
    ["date", "2026-12-24", new Date("2026-12-24T23:59:59").toISOString()],
  ] as const)("expires “%s” %s at %s", (choice, day, expiresAt) => {
    expect(expiryOf(choice, day, now)).toEqual({ ok: true, expiresAt });
  });
  it.each([
    ["", /Choose the last day/],
    ["2026-11-30", /has passed/],
  ])("does not expire on the date “%s”", (day, sentence) => {
    const expiry = expiryOf("date", day, now);
    expect(expiry.ok ? "" : expiry.sentence).toMatch(sentence);
  });
});
