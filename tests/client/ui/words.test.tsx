import { cleanup, render, screen } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { afterEach, describe, expect, it, vi } from "vitest";
import { Button } from "../../../client/ui/button.tsx";
import { TextField } from "../../../client/ui/field.tsx";
import { sayMoment } from "../../../client/ui/moment.tsx";
import { NoticeRegion } from "../../../client/ui/notice-region.tsx";
import { currentNotices, putAway, say } from "../../../client/ui/notices.ts";

afterEach(() => {
  cleanup();
  vi.useRealTimers();
  for (const { id } of currentNotices()) putAway(id);
});

describe("a moment, said on 1 December at noon", () => {
  const now = new Date(2026, 11, 1, 12, 0);
  it.each([
    [new Date(2026, 11, 1, 9, 5), "today 09:05"],
    [new Date(2026, 11, 1, 23, 59), "today 23:59"],
    [new Date(2026, 10, 30, 23, 59), "yesterday 23:59"],
    [new Date(2026, 11, 2, 0, 1), "tomorrow 00:01"],
    [new Date(2026, 10, 29, 12, 0), "29 Nov 2026"],
    [new Date(2025, 11, 1, 12, 0), "1 Dec 2025"],
  ])("%s is “%s”", (date, said) => {
    expect(sayMoment(date, now)).toBe(said);
  });
});

describe("notices", () => {
  it("are three at most, the newest last, none twice", () => {
    for (const words of ["one", "two", "three", "four", "two"]) say(words);
    expect(currentNotices().map(({ sentence }) => sentence)).toEqual(["three", "four", "two"]);
  });

  it("of what was done go by themselves, of what was refused stay until put away", async () => {
    vi.useFakeTimers({ shouldAdvanceTime: true });
    render(<NoticeRegion />);
    say("Done.");
    say("Refused.", "refused");
    expect(await screen.findByText("Done.")).toBeDefined();
    await vi.advanceTimersByTimeAsync(9_000);
    expect(screen.queryByText("Done.")).toBeNull();
    expect(screen.getByText("Refused.")).toBeDefined();
    await userEvent
      .setup({ advanceTimers: vi.advanceTimersByTime })
      .click(screen.getByRole("button", { name: "Put away" }));
    expect(screen.queryByText("Refused.")).toBeNull();
  });

  it("are read aloud from a region that is there before them", () => {
    render(<NoticeRegion />);
    expect(screen.getByRole("status", { name: "Notices" }).getAttribute("aria-live")).toBe("polite");
  });
});

describe("a busy button", () => {
  it("keeps the focus and does nothing, not even send its form", async () => {
    const press = vi.fn();
    const send = vi.fn();
    render(
      <form onSubmit={send}>
        <Button type="submit" busy busyLabel="Sending" onClick={press}>
          Send
        </Button>
      </form>,
    );
    const button = screen.getByRole("button", { name: "Sending" });
    await userEvent.click(button);
    expect(document.activeElement).toBe(button);
    expect(button.getAttribute("aria-disabled")).toBe("true");
    expect([press, send].map(({ mock }) => mock.calls.length)).toEqual([0, 0]);
  });
});

describe("a field", () => {
  it("is named by its label and described by its hint and its error", () => {
    render(
      <TextField
        label="Name"
        hint="Only seen by owners."
        error="Give it a name."
        value=""
        onValue={() => undefined}
      />,
    );
    const field = screen.getByLabelText("Name");
    const described = field.getAttribute("aria-describedby")?.split(" ") ?? [];
    expect(described.map((id) => document.getElementById(id)?.textContent)).toEqual([
      "Only seen by owners.",
      "Give it a name.",
    ]);
    expect(field.getAttribute("aria-invalid")).toBe("true");
  });
});
