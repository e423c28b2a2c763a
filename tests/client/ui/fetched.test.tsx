import { act, cleanup, render, screen } from "@testing-library/react";
import { afterEach, describe, expect, it, vi } from "vitest";
import { fetched } from "../../../client/ui/fetched.tsx";
import { currentNotices, putAway } from "../../../client/ui/notices.ts";

afterEach(() => {
  cleanup();
  vi.restoreAllMocks();
  for (const { id } of currentNotices()) putAway(id);
});
const Greeting = ({ name }: { readonly name: string }) => <p>{`Good evening, ${name}`}</p>;

describe("a part of the page that is fetched", () => {
  it("is drawn when its code is there, and until then what stands in its place", async () => {
    const { Part } = fetched(() => Promise.resolve(Greeting));
    render(<Part name="Wren" meanwhile={<p>a moment</p>} />);
    expect(screen.getByText("a moment")).toBeTruthy();
    expect(await screen.findByText("Good evening, Wren")).toBeTruthy();
    expect(screen.queryByText("a moment")).toBeNull();
  });

  it("is drawn at once when it was made ready, and fetched only once", async () => {
    const load = vi.fn(() => Promise.resolve(Greeting));
    const { prepare, Part } = fetched(load);
    void prepare();
    await act(() => Promise.resolve());
    render(<Part name="Otto" />);
    expect(screen.getByText("Good evening, Otto")).toBeTruthy();
    expect(load).toHaveBeenCalledTimes(1);
  });

  it("says so when it cannot be fetched, and is tried again the next time it is wanted", async () => {
    vi.spyOn(console, "warn").mockReturnValue();
    let online = false;
    const { Part } = fetched(() =>
      online ? Promise.resolve(Greeting) : Promise.reject(new Error("offline")),
    );
    const onMissing = vi.fn();
    const first = render(<Part name="Wren" onMissing={onMissing} />);
    await vi.waitFor(() => {
      expect(onMissing).toHaveBeenCalledTimes(1);
    });
    expect(currentNotices().map(({ sentence }) => sentence)).toEqual([
      expect.stringContaining("could not be fetched"),
    ]);
    first.unmount();
    online = true;
    render(<Part name="Wren" onMissing={onMissing} />);
    expect(await screen.findByText("Good evening, Wren")).toBeTruthy();
    expect(onMissing).toHaveBeenCalledTimes(1);
  });
});
