/** A notebook has an end, or one writer could fill the memory that all notebooks share. */
import { expect, test } from "vitest";
import * as Y from "yjs";
import { DocumentSize } from "../../../server/collab/document-size.ts";
import { LARGEST_DOCUMENT_BYTES } from "../../../server/collab/limits.ts";
import { step1, update } from "./raw-socket.ts";
import { setStage } from "./stage.ts";
import { until } from "./until.ts";
import { paragraphOf } from "./writer.ts";

const stage = setStage();

test("measures only near the limit, and not again and again", () => {
  let [now, measured, measurements] = [0, 60, 0];
  const size = new DocumentSize(
    50,
    () => {
      measurements += 1;
      return measured;
    },
    () => now,
  );
  size.add(30);
  expect([size.hasRoomFor(20, 100), measurements]).toEqual([true, 0]);
  expect([size.hasRoomFor(21, 100), measurements]).toEqual([true, 1]);
  size.add(35);
  measured = 95;
  expect([size.hasRoomFor(6, 100), measurements]).toEqual([false, 1]);
  now = 20_000;
  expect([size.hasRoomFor(6, 100), size.hasRoomFor(5, 100), measurements]).toEqual([false, true, 2]);
});

test("a full notebook takes no more, says so, and can be made smaller", async () => {
  const notebookId = await stage.notebook();
  const socket = await stage.raw(stage.ben, notebookId);
  socket.send(step1());
  const document = new Y.Doc();
  const text = paragraphOf(document);
  const change = (work: () => void) => {
    const before = Y.encodeStateVector(document);
    work();
    socket.send(update(Y.encodeStateAsUpdate(document, before)));
  };
  socket.send(update(Y.encodeStateAsUpdate(document)));
  const page = "x".repeat(4_000_000);
  const pages = Math.floor(LARGEST_DOCUMENT_BYTES / page.length);
  for (let count = 1; count <= pages; count += 1) {
    change(() => text.insert(0, page));
    await until("it is saved", () => socket.saved() === count + 1);
  }
  const colleague = await stage.raw(stage.ada, notebookId);
  colleague.send(step1());
  const whole = Y.encodeStateAsUpdate(document);
  await until("the colleague has it", () => Y.encodeStateVector(colleague.document).length > 1);
  expect(paragraphOf(colleague.document).length).toBe(text.length);
  expect(whole.length).toBeLessThan(LARGEST_DOCUMENT_BYTES);
  change(() => text.insert(0, page));
  await until("it is refused", () =>
    socket.notices().some((notice) => notice.about === "rejected" && /full/.test(notice.reason)),
  );
  const before = Y.encodeStateVector(colleague.document);
  paragraphOf(colleague.document).delete(0, 1_000_000);
  colleague.send(update(Y.encodeStateAsUpdate(colleague.document, before)));
  await until("what only deletes is taken", () => colleague.saved() === 1);
});
