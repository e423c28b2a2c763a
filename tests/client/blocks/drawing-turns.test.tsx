import { act, cleanup, render, screen } from "@testing-library/react";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import {
  createDrawingTurns,
  useTurn,
  type DrawingTurns,
} from "../../../client/editor/blocks/drawing-turns.ts";

let turns: DrawingTurns;
beforeEach(() => {
  turns = createDrawingTurns();
});
afterEach(() => {
  cleanup();
  turns.destroy();
});
const nextTask = () => act(() => new Promise((resolve) => setTimeout(resolve, 0)));

let isReady = true;
let becomeReady: () => void = () => undefined;
let ready = Promise.resolve();
beforeEach(() => {
  isReady = false;
  ready = new Promise((resolve) => {
    becomeReady = () => {
      isReady = true;
      resolve();
    };
  });
});
const asksIsReady = () => isReady;
const asksReady = () => ready;
const Block = ({ name }: { readonly name: string }) =>
  useTurn(turns, asksIsReady, asksReady) ? <p>{name}</p> : <p>a moment</p>;
const drawn = () => screen.queryAllByText(/^block/).map(({ textContent }) => textContent);

describe("the blocks of a notebook", () => {
  it("wait for the code that draws them, and are then drawn one after the other in their order", async () => {
    render(
      <>
        <Block name="block 1" />
        <Block name="block 2" />
        <Block name="block 3" />
      </>,
    );
    await nextTask();
    expect(drawn()).toEqual([]);
    await act(async () => {
      becomeReady();
      await vi.waitFor(() => {
        expect(drawn()).toHaveLength(3);
      });
    });
    expect(drawn()).toEqual(["block 1", "block 2", "block 3"]);
  });

  it("are drawn without waiting when one is placed, but not when a hundred appear", () => {
    becomeReady();
    render(<Block name="block 1" />);
    expect(drawn()).toEqual(["block 1"]);
    render(<Block name="block 2" />);
    expect(drawn()).toEqual(["block 1"]);
  });

  it("that have gone meanwhile take no turn", async () => {
    const { unmount } = render(<Block name="block 1" />);
    await nextTask();
    unmount();
    await act(async () => {
      becomeReady();
      await ready;
    });
    await nextTask();
    expect(drawn()).toEqual([]);
  });
});
