import * as encoding from "lib0/encoding";
import * as syncProtocol from "y-protocols/sync";
import { describe, expect, it } from "vitest";
import * as Y from "yjs";
import { contentOf, createSavedCount } from "../../../client/editor/saved-count.ts";

/** A frame as y-websocket sends it: message type 0, then what y-protocols/sync writes. */
function frame(write: (encoder: encoding.Encoder) => void): Uint8Array {
  const encoder = encoding.createEncoder();
  encoding.writeVarUint(encoder, 0);
  write(encoder);
  return encoding.toUint8Array(encoder);
}
const doc = new Y.Doc();
const step1 = frame((encoder) => syncProtocol.writeSyncStep1(encoder, doc));
const step2 = frame((encoder) => syncProtocol.writeSyncStep2(encoder, doc));
const update = frame((encoder) => syncProtocol.writeUpdate(encoder, Y.encodeStateAsUpdate(doc)));
const presence = Uint8Array.of(1, 1, 0);

describe("which frames carry content", () => {
  it.each([
    ["step 1", step1, null],
    ["step 2", step2, "step 2"],
    ["an update", update, "update"],
    ["presence", presence, null],
    ["nothing", new Uint8Array(), null],
  ])("%s", (_name, bytes, content) => expect(contentOf(bytes)).toBe(content));
});

describe("whether all is saved", () => {
  it("is so before anything was typed", () => {
    expect(createSavedCount(false).unsaved()).toBe(false);
  });

  it("is not so from a keystroke until its frame is committed", () => {
    const count = createSavedCount(false);
    count.connected();
    count.sent(step1);
    count.sent(step2);
    count.committed(1);
    count.typed();
    count.sent(update);
    expect(count.unsaved()).toBe(true);
    count.committed(1);
    expect(count.unsaved()).toBe(true);
    count.committed(2);
    expect(count.unsaved()).toBe(false);
  });

  it("waits for the newest of several keystrokes", () => {
    const count = createSavedCount(false);
    count.connected();
    count.sent(step2);
    for (let key = 0; key < 3; key += 1) {
      count.typed();
      count.sent(update);
    }
    count.committed(3);
    expect(count.unsaved()).toBe(true);
    count.committed(4);
    expect(count.unsaved()).toBe(false);
  });

  it("does not take a count for an answer to step 1 that was never given", () => {
    const count = createSavedCount(false);
    count.typed();
    count.connected();
    count.committed(0);
    expect(count.unsaved()).toBe(true);
    count.sent(step2);
    count.committed(1);
    expect(count.unsaved()).toBe(false);
  });

  it("starts counting anew with each connection", () => {
    const count = createSavedCount(false);
    count.connected();
    count.sent(step2);
    count.typed();
    count.sent(update);
    count.connected();
    count.committed(2);
    expect(count.unsaved()).toBe(true);
    count.sent(step2);
    count.committed(1);
    expect(count.unsaved()).toBe(false);
  });

  it("remembers what an earlier page did not get through", () => {
    const count = createSavedCount(true);
    expect(count.unsaved()).toBe(true);
    count.connected();
    count.sent(step2);
    count.committed(1);
    expect(count.unsaved()).toBe(false);
  });
});
