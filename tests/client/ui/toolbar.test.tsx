import { cleanup, render, screen } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { afterEach, describe, expect, it } from "vitest";
import { Toolbar } from "../../../client/ui/toolbar.tsx";

afterEach(cleanup);

function Bar({ last = false }: { readonly last?: boolean }) {
  return (
    <>
      <input aria-label="before" />
      <Toolbar label="Form">
        <button type="button">one</button>
        <button type="button" disabled>
          two
        </button>
        <button type="button">three</button>
        {last && <button type="button">four</button>}
      </Toolbar>
      <input aria-label="after" />
    </>
  );
}
const focused = () =>
  document.activeElement?.textContent ?? document.activeElement?.getAttribute("aria-label");
const stops = () =>
  screen
    .getAllByRole<HTMLButtonElement>("button")
    .filter(({ disabled, tabIndex }) => !disabled && tabIndex === 0).length;

describe("a bar of buttons", () => {
  it("is one stop of the Tab key, and comes back to the button one left", async () => {
    const user = userEvent.setup();
    render(<Bar />);
    screen.getByLabelText("before").focus();
    await user.tab();
    expect(focused()).toBe("one");
    await user.keyboard("{ArrowRight}");
    expect(focused()).toBe("three");
    await user.tab();
    expect(document.activeElement?.getAttribute("aria-label")).toBe("after");
    await user.tab({ shift: true });
    expect(focused()).toBe("three");
  });

  it("goes round, and to its ends with Home and End, past what cannot be pressed", async () => {
    const user = userEvent.setup();
    render(<Bar />);
    screen.getByText("one").focus();
    const visited: (string | null | undefined)[] = [];
    for (const key of ["ArrowLeft", "ArrowRight", "End", "Home"]) {
      await user.keyboard(`{${key}}`);
      visited.push(focused());
    }
    expect(visited).toEqual(["three", "one", "three", "one"]);
  });

  it("keeps exactly one stop while buttons come and go", () => {
    const { rerender } = render(<Bar />);
    screen.getByText("three").focus();
    rerender(<Bar last />);
    expect(stops()).toBe(1);
    screen.getByText("four").focus();
    expect(stops()).toBe(1);
    rerender(<Bar />);
    expect(stops()).toBe(1);
  });
});
