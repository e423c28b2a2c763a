import { cleanup, render, screen } from "@testing-library/react";
import { MemoryRouter } from "react-router-dom";
import { afterEach, describe, expect, it, vi } from "vitest";
import { PageBoundary } from "../../../client/app/page-boundary.tsx";
import { openSite } from "../opened.tsx";
import { ok, serve, signedIn, signedOut, wren } from "../served.ts";

afterEach(() => {
  cleanup();
  vi.restoreAllMocks();
});

describe("the first page", () => {
  it("tells someone new what this is and how to come in", async () => {
    serve({ "GET /api/me": signedOut });
    openSite("/");
    expect(await screen.findByRole("heading", { level: 1 })).toBeDefined();
    expect(screen.getByRole("link", { name: "Sign in with GitHub" }).getAttribute("href")).toBe(
      "/auth/github?next=%2Fshelf",
    );
    expect(screen.queryByText(/This is a demonstration/)).toBeNull();
    expect(document.title).toBe("Subleading");
  });

  it.each([
    ["refused", /You did not allow the sign-in/],
    ["failed", /Signing in did not work/],
  ])("says why one is back without being signed in: %s", async (why, words) => {
    serve({ "GET /api/me": signedOut });
    openSite(`/?sign-in=${why}&next=%2Fnotebooks%2F1`);
    expect(await screen.findByText(words)).toBeDefined();
    expect(screen.getByRole("link", { name: "Sign in with GitHub" }).getAttribute("href")).toBe(
      "/auth/github?next=%2Fnotebooks%2F1",
    );
  });

  it("says plainly that the accounts are invented while the stand-ins are in use", async () => {
    serve({
      "GET /api/me": () =>
        ok({ person: null, csrfToken: "", demonstration: { mailboxUrl: "http://127.0.0.1:9/mail" } }),
    });
    openSite("/");
    expect(await screen.findByText(/the accounts are invented/)).toBeDefined();
    expect(screen.getByRole("link", { name: "the demonstration mailbox" }).getAttribute("href")).toBe(
      "http://127.0.0.1:9/mail",
    );
  });
});

describe("every page", () => {
  it.each([
    ["/", signedOut],
    ["/shelf", signedOut],
    ["/nowhere", signedIn],
    ["/notebooks/1/sharing", signedIn],
  ])("has one main part, one first heading and a way past the header: %s", async (address, me) => {
    serve({ "GET /api/me": me });
    openSite(address);
    await screen.findByRole("heading", { level: 1 });
    expect(screen.getAllByRole("main")).toHaveLength(1);
    expect(screen.getAllByRole("heading", { level: 1 })).toHaveLength(1);
    expect(screen.getByRole("link", { name: "Skip to the page" }).getAttribute("href")).toBe("#main");
    expect(screen.getByLabelText("Light of the page")).toBeDefined();
  });

  it("takes the focus to its top when one comes to it from another", async () => {
    serve({ "GET /api/me": signedIn, "GET /api/notebooks": () => ok({ notebooks: [], nextCursor: null }) });
    const { user } = openSite("/nowhere");
    await user.click(await screen.findByRole("link", { name: "to the first page" }));
    await screen.findByRole("heading", { name: "Shelf" });
    expect(document.activeElement?.id).toBe("main");
  });

  it("says who is signed in", async () => {
    serve({ "GET /api/me": signedIn });
    openSite("/nowhere");
    expect(await screen.findByText(wren.name)).toBeDefined();
    expect(screen.getByRole("button", { name: "Sign out" })).toBeDefined();
  });
});

describe("a page that fails", () => {
  function Faulty(): never {
    throw new Error("no such sign");
  }
  it("says so in its own place, and the next address has another chance", () => {
    const log = vi.spyOn(console, "error").mockImplementation(() => undefined);
    const at = (address: string, page: React.ReactNode) => (
      <MemoryRouter>
        <PageBoundary resetKey={address}>{page}</PageBoundary>
      </MemoryRouter>
    );
    const { rerender } = render(at("/a", <Faulty />));
    expect(screen.getByRole("heading").textContent).toBe("This page could not be drawn");
    expect(screen.getByText("no such sign")).toBeDefined();
    expect(log).toHaveBeenCalled();
    rerender(at("/b", <p>well</p>));
    expect(screen.getByText("well")).toBeDefined();
  });
});
